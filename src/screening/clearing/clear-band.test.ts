import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { clearBands } from "./clear-band";

describe("bands of a factor that clear", () => {
  it("reach from zero to the edge where the excess grows", () => {
    const { fromZero, nearest } = clearBands((f) => 4 * f);
    expect(fromZero?.from).toBe(0);
    expect(fromZero?.to).toBeCloseTo(0.25, 8);
    expect(nearest).toEqual(fromZero);
  });

  it("are two where a relieving current clears and zero does as well", () => {
    const { fromZero, nearest } = clearBands((f) => (f < 0.2 || (f > 0.6 && f < 0.9) ? 0.5 : 2));
    expect(fromZero?.to).toBeCloseTo(0.2, 8);
    expect(nearest?.from).toBeCloseTo(0.6, 8);
    expect(nearest?.to).toBeCloseTo(0.9, 8);
  });

  it("go beyond the present value where that clears, and end somewhere", () => {
    expect(clearBands((f) => f / 3).nearest?.to).toBeCloseTo(3, 7);
    expect(clearBands(() => 0.5).nearest).toEqual({ from: 0, to: 64 });
  });

  it("are found where they are narrower than the grid, and hold at their ends (convex excess)", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.05, max: 0.95, noNaN: true }),
        fc.double({ min: 1e-3, max: 0.5, noNaN: true }),
        (centre, halfWidth) => {
          const excess = (f: number) => ((f - centre) / halfWidth) ** 2;
          const { nearest } = clearBands(excess);
          expect(nearest).not.toBeNull();
          expect(excess(nearest?.to ?? 9)).toBeLessThanOrEqual(1);
          expect(excess(nearest?.from ?? 9)).toBeLessThanOrEqual(1);
          expect(nearest?.to).toBeCloseTo(Math.max(nearest?.to ?? 0, Math.min(1, centre + halfWidth)), 6);
          expect(nearest?.from).toBeCloseTo(Math.max(0, centre - halfWidth), 6);
        },
      ),
    );
  });
});
