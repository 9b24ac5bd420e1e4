import { createHash } from "node:crypto";

const loneSurrogate = /\p{Surrogate}/u;

/** Whether text holds half of a surrogate pair, which has no UTF-8 form and therefore no digest. */
export function hasLoneSurrogate(text: string): boolean {
  return loneSurrogate.test(text);
}

/**
 * Canonical JSON: no white space, keys sorted by UTF-16 code units, numbers and strings as ECMAScript
 * writes them. Two documents with the same content have the same text whatever the order of their keys.
 *
 * @param value JSON data; keys whose value is undefined are left out, as JSON.stringify does
 * @throws TypeError where the value has no JSON form: not finite, a lone surrogate, a function ...
 * @see RFC 8785, JSON Canonicalization Scheme
 */
export function canonicalJson(value: unknown): string {
  switch (typeof value) {
    case "string":
      if (hasLoneSurrogate(value))
        throw new TypeError("Text with half a surrogate pair has no canonical form");
      return JSON.stringify(value);
    case "number":
      if (!Number.isFinite(value)) throw new TypeError(`${value} has no JSON form`);
      return JSON.stringify(value);
    case "boolean":
      return String(value);
    case "object":
      break;
    default:
      throw new TypeError(`A value of type ${typeof value} has no JSON form`);
  }
  if (value === null) return "null";
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(",")}]`;
  // < on strings compares UTF-16 code units, which is the order that the RFC asks for.
  const members = Object.entries(value).filter(([, member]) => member !== undefined);
  const sorted = members.sort(([a], [b]) => (a < b ? -1 : Number(a > b)));
  return `{${sorted.map(([key, member]) => `${canonicalJson(key)}:${canonicalJson(member)}`).join(",")}}`;
}

/**
 * SHA-256 of the canonical JSON of a value, in UTF-8.
 *
 * @returns 64 hexadecimal digits
 * @throws TypeError as `canonicalJson`
 */
export function digestOf(value: unknown): string {
  return createHash("sha256").update(canonicalJson(value), "utf8").digest("hex");
}
