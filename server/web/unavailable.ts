/** Work that this server cannot do now. The message says so in a sentence that people and programs may see. */
export class Unavailable extends Error {
  readonly status = 503;

  /** @param retryAfter_s null where waiting would not help */
  constructor(
    message: string,
    readonly retryAfter_s: number | null,
  ) {
    super(message);
  }
}

/** More work waits than can be done in sensible time. */
export function overloaded(): Unavailable {
  return new Unavailable("Too many screenings are under way. Try again in a minute.", 60);
}

/** The server is about to end. */
export function stopping(): Unavailable {
  return new Unavailable("The server is being stopped.", null);
}

/** A piece of work that was ended because it took too long. */
export function tooLong(ceiling_s: number): Unavailable {
  return new Unavailable(
    `The work was ended after ${ceiling_s} s, the longest that one piece of it may take on this server. ` +
      "Fewer failures, or shorter horizons, take less; whoever runs the server can allow more by SCREEN_SECONDS.",
    null,
  );
}
