import { describe, expect, it } from "vitest";
import { REFERENCE_CASES } from "./cases/all";
import { toleranceOf } from "./reference-case";

describe("published figures", { timeout: 30_000 }, () => {
  it.each(REFERENCE_CASES.map((entry) => [entry.id, entry] as const))(
    "meets %s within its rounding",
    (_id, entry) => {
      const computed = entry.compute();
      expect(computed).toHaveLength(entry.expected.length);
      entry.expected.forEach((expected, index) => {
        expect(
          Math.abs((computed[index] ?? NaN) - expected),
          `${entry.geometry}: ${computed[index]}`,
        ).toBeLessThanOrEqual(toleranceOf(entry, index));
      });
    },
  );
});
