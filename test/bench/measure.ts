/** Times of one function, in ms a call. */
export interface Timing {
  readonly median: number;
  readonly least: number;
  readonly runs: number;
}

/** What a bench has to say: a line of the page. */
export interface Line {
  readonly what: string;
  readonly figure: string;
  /** what it is held against; false: missed */
  readonly bound?: { readonly text: string; readonly met: boolean };
}

/** One subject of the bench page. */
export interface Bench {
  readonly title: string;
  run(): Line[] | Promise<Line[]>;
}

/**
 * Times a function after a warm-up: calls are grouped until a group takes a few milliseconds, so that the clock's
 * grain does not show.
 *
 * @param call what is timed; its result is kept from being optimised away
 * @param seconds spent on it at most
 */
export function time(call: () => unknown, seconds = 1): Timing {
  const warm = performance.now() + 200 * seconds;
  let calls = 0;
  let kept: unknown;
  while (performance.now() < warm || calls < 3) {
    kept = call();
    calls += 1;
    if (performance.now() > warm + 2000) break;
  }
  const each = (200 * seconds) / calls;
  const group = Math.max(1, Math.round(2 / each));
  const times: number[] = [];
  const end = performance.now() + 800 * seconds;
  while (times.length < 5 || (performance.now() < end && times.length < 1000)) {
    const start = performance.now();
    for (let i = 0; i < group; i += 1) kept = call();
    times.push((performance.now() - start) / group);
  }
  times.sort((a, b) => a - b);
  if (kept === undefined) throw new Error("A timed call must return something");
  return {
    median: times[Math.floor(times.length / 2)] ?? 0,
    least: times[0] ?? 0,
    runs: times.length * group,
  };
}

/** A time in ms with three digits. */
export function ms(milliseconds: number): string {
  return `${Number(milliseconds.toPrecision(3))} ms`;
}

/** A ratio as people say it. */
export function ratio(slow: number, fast: number): string {
  return `${Number((slow / fast).toPrecision(2))} times`;
}

/** A line whose median must stay below a bound. */
export function below(what: string, timing: Timing, bound: number): Line {
  return {
    what,
    figure: ms(timing.median),
    bound: { text: `below ${ms(bound)}`, met: timing.median < bound },
  };
}
