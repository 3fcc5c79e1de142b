import { describe, expect, it } from "vitest";
import { bearingText, moveWords, searchedWords } from "./clearing-words";

const plain = (text: string) => text.replace(/\u00a0/g, " ");

describe("a move in words", () => {
  it("says how far level, whereto, and how far up or down", () => {
    expect(plain(moveWords({ distanceM: 0.93, bearingDeg: 102.5, riseM: 0 }))).toBe(
      "0.93 m towards 103° true",
    );
    expect(plain(moveWords({ distanceM: 0.98, bearingDeg: null, riseM: 0.98 }))).toBe("0.98 m up");
    expect(plain(moveWords({ distanceM: 0.5, bearingDeg: 7, riseM: -0.3 }))).toBe(
      "0.40 m towards 007° true and 0.30 m down",
    );
    expect(plain(bearingText(359.7))).toBe("000° true");
  });

  it("says where was looked", () => {
    const heights = { fromHeightM: 0, toHeightM: 2.5, furthestM: 22.14 };
    expect(plain(searchedWords({ region: "zone", zoneName: "Dock", ...heights }))).toBe(
      "in the zone “Dock”, from 0.00 m to 2.50 m high, up to 22.14 m away",
    );
  });
});
