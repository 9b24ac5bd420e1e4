import type { Fault } from "./faults.js";

/** Faults that wait for their place in the form; each is given out once. */
export interface FaultBook {
  /** messages of these fields, joined; undefined where there is none */
  take(...pointers: string[]): string | undefined;
  /** messages of a place and of everything below it that nobody took */
  takeBelow(pointer: string): string[];
}

/** A book of faults. */
export function faultBook(faults: readonly Fault[]): FaultBook {
  const waiting = new Map<string, string[]>();
  for (const { pointer, message } of faults) {
    const messages = waiting.get(pointer);
    if (messages === undefined) waiting.set(pointer, [message]);
    else messages.push(message);
  }
  const taken = (pointer: string): string[] => {
    const messages = waiting.get(pointer) ?? [];
    waiting.delete(pointer);
    return messages;
  };
  return {
    take(...pointers) {
      const messages = pointers.flatMap(taken);
      return messages.length === 0 ? undefined : messages.join(". ");
    },
    takeBelow: (place) =>
      [...waiting.keys()]
        .filter((pointer) => pointer === place || pointer.startsWith(`${place}/`))
        .flatMap(taken),
  };
}
