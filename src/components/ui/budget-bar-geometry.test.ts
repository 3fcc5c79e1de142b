import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { budgetBarGeometry } from "./budget-bar-geometry";

const part = (id: string, share: number) => ({ id, key: id, name: id, part: share });

describe("budgetBarGeometry", () => {
  it("stacks spending from zero to the value, the greatest first", () => {
    const bar = budgetBarGeometry({
      budgetUsed: 0.5,
      uncertaintyShare: 0.1,
      parts: [part("a", 0.2), part("b", 0.8)],
    });
    expect(bar.zero).toBe(0);
    expect(bar.segments.map(({ id }) => id)).toEqual(["b", "a"]);
    const last = bar.segments[1];
    expect((last?.from ?? 0) + (last?.width ?? 0)).toBeCloseTo(bar.value, 9);
    expect(bar.value / bar.full).toBeCloseTo(0.5, 9);
  });

  it("draws relief to the left of zero", () => {
    const bar = budgetBarGeometry({
      budgetUsed: 0.8,
      uncertaintyShare: 0,
      parts: [part("a", 1.5), part("b", -0.5)],
    });
    const relief = bar.segments.find(({ relieves }) => relieves);
    expect(relief?.id).toBe("b");
    expect((relief?.from ?? 0) + (relief?.width ?? 0)).toBeCloseTo(bar.zero, 9);
    expect(bar.zero).toBeGreaterThan(0);
  });

  it("puts a value that is undecided inside the guard band, and one that is over behind it", () => {
    const undecided = budgetBarGeometry({ budgetUsed: 1.05, uncertaintyShare: 0.1, parts: [part("a", 1)] });
    expect(undecided.value).toBeGreaterThan(undecided.guard.from);
    expect(undecided.value).toBeLessThan(undecided.guard.from + undecided.guard.width);
    const over = budgetBarGeometry({ budgetUsed: 1.2, uncertaintyShare: 0.1, parts: [part("a", 1)] });
    expect(over.value).toBeGreaterThan(over.guard.from + over.guard.width);
  });

  it("keeps everything on the bar, and right minus left at the value, whatever the parts", () => {
    const parts = fc.array(fc.double({ min: -3, max: 3, noNaN: true }), { minLength: 1, maxLength: 12 });
    const used = fc.double({ min: 0, max: 500, noNaN: true });
    fc.assert(
      fc.property(
        parts,
        used,
        fc.double({ min: 0, max: 2, noNaN: true }),
        (raw, budgetUsed, uncertaintyShare) => {
          const total = raw.reduce((sum, share) => sum + share, 0);
          fc.pre(Math.abs(total) > 0.1);
          const shares = raw.map((share, index) => part(String(index), share / total));
          const bar = budgetBarGeometry({ budgetUsed, uncertaintyShare, parts: shares });
          let net = 0;
          for (const { from, width, relieves } of bar.segments) {
            expect(from).toBeGreaterThanOrEqual(-1e-6);
            expect(from + width).toBeLessThanOrEqual(100 + 1e-6);
            net += relieves ? -width : width;
          }
          expect(net).toBeCloseTo(bar.value - bar.zero, 6);
          expect(bar.guard.from + bar.guard.width).toBeLessThanOrEqual(100 + 1e-6);
          expect(bar.ticks.length).toBeLessThanOrEqual(6);
        },
      ),
    );
  });
});
