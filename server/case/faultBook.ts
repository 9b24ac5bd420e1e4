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
  const waiting = new Set(faults);
  const taken = (chosen: (fault: Fault) => boolean): string[] => {
    const messages: string[] = [];
    for (const fault of waiting) {
      if (!chosen(fault)) continue;
      waiting.delete(fault);
      messages.push(fault.message);
    }
    return messages;
  };
  return {
    take(...pointers) {
      const messages = taken(({ pointer }) => pointers.includes(pointer));
      return messages.length === 0 ? undefined : messages.join(". ");
    },
    takeBelow: (place) => taken(({ pointer }) => pointer === place || pointer.startsWith(`${place}/`)),
  };
}
