import { describe, expect, it } from "vitest";
import { changedVerdicts, largestDifference } from "./recomputation";
import type { ScreeningResult } from "./screening-result";

type Part = { id: string; verdict: "within" | "undecided" | "over"; value: number };

/** As much of a result as a recomputation reads. */
const result = (...parts: Part[]) =>
  ({
    sensors: parts.map(({ id, verdict, value }) => ({
      id,
      verdict,
      findings: [{ limitId: "1", value, expandedUncertainty: 1e-8 }],
    })),
  }) as unknown as ScreeningResult;

describe("a recomputation", () => {
  const then = result({ id: "a", verdict: "over", value: 2e-6 }, { id: "b", verdict: "within", value: 1e-7 });

  it("says nothing of equal results", () => {
    expect(largestDifference(then, structuredClone(then))).toBe(0);
    expect(changedVerdicts(then, structuredClone(then))).toEqual([]);
  });

  it("gives the largest difference of any value, and each changed verdict", () => {
    const now = result(
      { id: "a", verdict: "undecided", value: 1e-6 },
      { id: "b", verdict: "within", value: 1.01e-7 },
    );
    expect(largestDifference(then, now)).toBeCloseTo(0.5, 12);
    expect(changedVerdicts(then, now)).toEqual([{ sensorId: "a", before: "over", after: "undecided" }]);
  });

  it("gives no number where a position is missing, and names it", () => {
    const now = result({ id: "a", verdict: "over", value: 2e-6 });
    expect(largestDifference(then, now)).toBe(null);
    expect(changedVerdicts(then, now)).toEqual([{ sensorId: "b", before: "within", after: null }]);
  });
});
