import { describe, expect, it } from "vitest";
import { emptyPlanDocument } from "~/domain/plan-document/plan-document";
import { canonicalJson } from "./canonical-json";
import { inputHash } from "./input-hash";

describe("canonicalJson", () => {
  it("serialises the example of RFC 8785, section 3.2.2", () => {
    const example = {
      numbers: [Number("333333333.33333329"), 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      string: "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"/",
      literals: [null, true, false],
    };
    expect(canonicalJson(example)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  it("sorts keys by UTF-16 code units, as the RFC's own list", () => {
    const keys = ["\u20ac", "\r", "\ufb33", "1", "\u{1f600}", "\u0080", "\u00f6"];
    const sorted = Object.keys(
      JSON.parse(canonicalJson(Object.fromEntries(keys.map((key) => [key, 0])))) as object,
    );
    expect(sorted).toEqual(["1", "\r", "\u0080", "\u00f6", "\u20ac", "\u{1f600}", "\ufb33"]);
  });

  it("refuses what JSON cannot hold", () => {
    expect(() => canonicalJson({ a: NaN })).toThrow(TypeError);
    expect(() => canonicalJson([undefined])).toThrow(TypeError);
  });
});

describe("inputHash", () => {
  it("is the SHA-256 of the canonical document", () => {
    // printf '%s' '{"circuits":[],…}' | sha256sum
    expect(inputHash(emptyPlanDocument("Blank"))).toMatch(/^sha256:[0-9a-f]{64}$/);
    expect(inputHash(emptyPlanDocument("Blank"))).toBe(EMPTY);
  });
});

const EMPTY = "sha256:42f757e1305a7aa6d11c74a23fe17491e5eb32980c209c0bf8d186c41cfaef4e";
