import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { runSteps } from "../../steps";
import { bestChoice, descendedChoice, exhaustiveChoice } from "./order-search";

/** The size of a sum of vectors, one for each place and option: what phase orders come to. */
function sizeOfSum(vectors: number[][][]) {
  return (choice: readonly number[]) => {
    const sum = [0, 0, 0, 0];
    choice.forEach((option, place) =>
      vectors[place]?.[option]?.forEach((value, i) => (sum[i] = (sum[i] ?? 0) + value)),
    );
    return Math.hypot(...sum);
  };
}

const vectors = fc.array(
  fc.array(fc.array(fc.integer({ min: -50, max: 50 }), { minLength: 4, maxLength: 4 }), {
    minLength: 6,
    maxLength: 6,
  }),
  { minLength: 2, maxLength: 4 },
);

describe("the search for the best combination", () => {
  it("tries all of them up to 20 000, and says where it did not", () => {
    let asked = 0;
    const cost = () => ((asked += 1), 1);
    expect(runSteps(bestChoice(5, 6, [0, 0, 0, 0, 0], cost), {}).exhaustive).toBe(true);
    expect(asked).toBe(6 ** 5 + 1);
    expect(runSteps(bestChoice(6, 6, [0, 0, 0, 0, 0, 0], cost), {}).exhaustive).toBe(false);
  });

  it("descends to the exhaustive optimum of small cases, nearly always exactly, never far off, never above the present", () => {
    let cases = 0;
    let exact = 0;
    fc.assert(
      fc.property(vectors, (of) => {
        const cost = sizeOfSum(of);
        const present = of.map(() => 0);
        const best = runSteps(exhaustiveChoice(of.length, 6, present, cost), {});
        const found = runSteps(descendedChoice(of.length, 6, present, cost), {});
        expect(found.cost).toBeCloseTo(cost(found.choice), 12);
        expect(found.cost).toBeLessThanOrEqual(cost(present));
        cases += 1;
        if (found.cost <= best.cost + 1e-9) exact += 1;
      }),
      { numRuns: 150 },
    );
    expect(exact / cases).toBeGreaterThan(0.8);
  });

  it("is the same every time", () => {
    const cost = (choice: readonly number[]) =>
      Math.abs(choice.reduce((sum, o, i) => sum + o * (i + 1), 0) - 37);
    const run = () => runSteps(bestChoice(8, 6, [0, 0, 0, 0, 0, 0, 0, 0], cost), {});
    expect(run()).toEqual(run());
    expect(run().cost).toBe(0);
  });
});
