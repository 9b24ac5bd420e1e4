import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { canonicalJson, digestOf } from "../../server/case/canonical.js";

describe("RFC 8785", () => {
  test("section 3.2.2 and 3.2.3: the sample object comes out as printed there", () => {
    const sample = {
      numbers: [Number("333333333.33333329"), 1e30, 4.5, 2e-3, Number("0.000000000000000000000000001")],
      string: JSON.parse('"\\u20ac$\\u000F\\u000aA\'\\u0042\\u0022\\u005c\\\\\\"\\/"'),
      literals: [null, true, false],
    };
    expect(canonicalJson(sample)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],' +
        '"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  test("section 3.2.3: keys are sorted by UTF-16 code units", () => {
    const sample = JSON.parse(
      '{"\\u20ac":"Euro Sign","\\r":"Carriage Return","\\ufb33":"Hebrew Letter Dalet With Dagesh",' +
        '"1":"One","\\ud83d\\ude00":"Emoji: Grinning Face","\\u0080":"Control","\\u00f6":"Latin Small Letter O With Diaeresis"}',
    );
    // An engine lists whole-number keys first, so the text itself is looked at.
    const text = canonicalJson(sample);
    const places = [
      "Carriage Return",
      "One",
      "Control",
      "Latin Small Letter O With Diaeresis",
      "Euro Sign",
      "Emoji: Grinning Face",
      "Hebrew Letter Dalet With Dagesh",
    ].map((name) => text.indexOf(name));
    expect(places).toEqual([...places].sort((a, b) => a - b));
    expect(places[0]).toBeGreaterThan(0);
  });

  test("appendix B: numbers are written as ECMAScript writes them", () => {
    const bits = (hex: string) => new DataView(Uint8Array.from(Buffer.from(hex, "hex")).buffer).getFloat64(0);
    const vectors: readonly (readonly [string, string])[] = [
      ["0000000000000000", "0"],
      ["8000000000000000", "0"],
      ["0000000000000001", "5e-324"],
      ["8000000000000001", "-5e-324"],
      ["7fefffffffffffff", "1.7976931348623157e+308"],
      ["ffefffffffffffff", "-1.7976931348623157e+308"],
      ["4340000000000000", "9007199254740992"],
      ["c340000000000000", "-9007199254740992"],
      ["4430000000000000", "295147905179352830000"],
      ["44b52d02c7e14af5", "9.999999999999997e+22"],
      ["44b52d02c7e14af6", "1e+23"],
      ["44b52d02c7e14af7", "1.0000000000000001e+23"],
      ["444b1ae4d6e2ef4e", "999999999999999700000"],
      ["444b1ae4d6e2ef4f", "999999999999999900000"],
      ["444b1ae4d6e2ef50", "1e+21"],
      ["3eb0c6f7a0b5ed8c", "9.999999999999997e-7"],
      ["3eb0c6f7a0b5ed8d", "0.000001"],
      ["41b3de4355555553", "333333333.3333332"],
      ["41b3de4355555554", "333333333.33333325"],
      ["41b3de4355555555", "333333333.3333333"],
      ["41b3de4355555556", "333333333.3333334"],
      ["41b3de4355555557", "333333333.33333343"],
      ["becbf647612f3696", "-0.0000033333333333333333"],
      ["43143ff3c1cb0959", "1424953923781206.2"],
    ];
    for (const [hex, text] of vectors) expect(canonicalJson(bits(hex))).toBe(text);
  });

  test("appendix B: what is not finite has no form", () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
      expect(() => canonicalJson(value)).toThrow(TypeError);
    }
  });

  test("section 3.2.2.2: a lone surrogate is an error, in text and in keys", () => {
    expect(() => canonicalJson("\ud83d")).toThrow(TypeError);
    expect(() => canonicalJson({ "\udead": 1 })).toThrow(TypeError);
    expect(canonicalJson("\ud83d\ude00")).toBe('"\ud83d\ude00"');
  });
});

describe("canonical form", () => {
  test("reading it back and writing it again changes nothing", () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        const text = canonicalJson(value);
        expect(canonicalJson(JSON.parse(text))).toBe(text);
      }),
    );
  });

  test("the order of keys does not count", () => {
    expect(canonicalJson({ b: 1, a: { d: [1, 2], c: null } })).toBe('{"a":{"c":null,"d":[1,2]},"b":1}');
  });

  test("a key named __proto__ is a key like any other", () => {
    expect(canonicalJson(JSON.parse('{"__proto__":{"a":1}}'))).toBe('{"__proto__":{"a":1}}');
  });

  test("functions and symbols have no form", () => {
    expect(() => canonicalJson(() => 1)).toThrow(TypeError);
    expect(() => canonicalJson([undefined])).toThrow(TypeError);
  });
});

test("the digest is the SHA-256 of the canonical text in UTF-8", () => {
  const expected = createHash("sha256").update('{"a":"°C","b":2}').digest("hex");
  expect(digestOf({ b: 2, a: "°C" })).toBe(expected);
});
