import { describe, expect, it } from "vitest";
import { isOwnName, releaseSentence, revisionLetters } from "./revision";

describe("revisionLetters", () => {
  it("counts A … Z, AA … ZZ, AAA without a gap", () => {
    expect([1, 2, 26, 27, 28, 52, 53, 702, 703].map(revisionLetters)).toEqual([
      "A",
      "B",
      "Z",
      "AA",
      "AB",
      "AZ",
      "BA",
      "ZZ",
      "AAA",
    ]);
  });
});

describe("releaseSentence", () => {
  it("changes with every decision", () => {
    const signed = (dispositions: Parameters<typeof releaseSentence>[0]["dispositions"]) =>
      releaseSentence({ ordinal: 2, planName: "Level 1", siteName: "North range", dispositions });
    expect(signed(["released", "held"])).toBe(
      "I have reviewed revision B of Level 1, North range, and release it: 1 position released, 0 released under concession, 1 held, 0 not released.",
    );
    expect(signed(["released", "concession"])).not.toBe(signed(["released", "not-released"]));
  });
});

describe("isOwnName", () => {
  it("takes another encoding and other spaces, and no other letters", () => {
    expect(isOwnName("  Zoe\u0308  Ahlgren ", "Zoë Ahlgren")).toBe(true);
    expect(isOwnName("Zoe Ahlgren", "Zoë Ahlgren")).toBe(false);
    expect(isOwnName("zoë ahlgren", "Zoë Ahlgren")).toBe(false);
  });
});
