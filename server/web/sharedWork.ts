/** One piece of work that several may wait for; it is given up when none of them does any more. */
export interface SharedWork<Result> {
  /** @param signal raised by whoever waits no longer */
  join(signal: AbortSignal | undefined): Promise<Result>;
  /** true once nobody waits for it any more */
  isGivenUp(): boolean;
}

/**
 * @param result of the work, which is under way
 * @param giveUp ends it
 */
export function sharedWork<Result>(
  result: Promise<Result>,
  giveUp: (reason: unknown) => void,
): SharedWork<Result> {
  let waiting = 0;
  let givenUp = false;
  // Whoever left does not hear how it ended.
  result.catch(() => undefined);

  return {
    isGivenUp: () => givenUp,
    async join(signal) {
      signal?.throwIfAborted();
      waiting += 1;
      if (signal === undefined) return result;
      let leave = (): void => undefined;
      const left = new Promise<never>((_, reject) => {
        leave = () => {
          reject(signal.reason);
          waiting -= 1;
          if (waiting > 0) return;
          givenUp = true;
          giveUp(signal.reason);
        };
      });
      signal.addEventListener("abort", leave);
      try {
        return await Promise.race([result, left]);
      } finally {
        signal.removeEventListener("abort", leave);
      }
    },
  };
}
