import { plainNumberText } from "../words/numbers.js";

/** A number as one would type it: up to four significant digits, no zeros behind the last that counts. */
export function shortNumber(value: number): string {
  return plainNumberText(value, 4);
}
