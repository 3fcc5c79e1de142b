import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bearingDeg, nearestLeg, pathLengthM } from "./geometry";
import { fitTo, gridStepM, panBy, shownBounds, toPlan, toScreen, zoomAt, type View } from "./view";

const views: fc.Arbitrary<View> = fc.record({
  scale: fc.double({ min: 0.1, max: 5000, noNaN: true }),
  x: fc.double({ min: -1e4, max: 1e4, noNaN: true }),
  y: fc.double({ min: -1e4, max: 1e4, noNaN: true }),
});
const places = fc.tuple(
  fc.double({ min: -500, max: 500, noNaN: true }),
  fc.double({ min: -500, max: 500, noNaN: true }),
);

describe("the view", () => {
  it("turns plan into screen and back", () => {
    fc.assert(
      fc.property(views, places, (view, place) => {
        const [x, y] = toPlan(view, toScreen(view, place));
        expect(x).toBeCloseTo(place[0], 5);
        expect(y).toBeCloseTo(place[1], 5);
      }),
    );
  });

  it("shows y upwards", () => {
    expect(toScreen({ scale: 10, x: 0, y: 100 }, [1, 2])).toEqual([10, 80]);
  });

  it("keeps what is under the pointer there while zooming", () => {
    fc.assert(
      fc.property(views, places, fc.double({ min: 0.2, max: 5, noNaN: true }), (view, atPx, factor) => {
        const before = toPlan(view, atPx);
        const after = toPlan(zoomAt(view, factor, atPx), atPx);
        expect(after[0]).toBeCloseTo(before[0], 4);
        expect(after[1]).toBeCloseTo(before[1], 4);
      }),
    );
  });

  it("fits bounds inside the screen", () => {
    const bounds = { minX: -3, minY: 2, maxX: 17, maxY: 9 };
    const size = { width: 800, height: 500 };
    const shown = shownBounds(fitTo(bounds, size), size);
    expect(shown.minX).toBeLessThan(bounds.minX);
    expect(shown.maxY).toBeGreaterThan(bounds.maxY);
    expect((shown.minX + shown.maxX) / 2).toBeCloseTo(7);
    expect((shown.minY + shown.maxY) / 2).toBeCloseTo(5.5);
  });

  it("pans by pixels", () => {
    expect(panBy({ scale: 3, x: 1, y: 2 }, 10, -5)).toEqual({ scale: 3, x: 11, y: -3 });
  });

  it("draws grid lines at round distances, never too close", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.06, max: 19_000, noNaN: true }), (scale) => {
        const stepM = gridStepM(scale, 24);
        expect(stepM * scale).toBeGreaterThanOrEqual(24 * (1 - 1e-9));
        expect(stepM * scale).toBeLessThan(24 * 2.5 * (1 + 1e-9));
      }),
    );
  });
});

describe("geometry", () => {
  it("measures paths in space", () => {
    const path = [
      [0, 0, 0],
      [3, 4, 0],
      [3, 4, 2],
    ] as const;
    expect(pathLengthM(path)).toBe(7);
    expect(nearestLeg([1.5, 2], path)).toMatchObject({ leg: 0, along: 0.5, distanceM: 0 });
    expect(nearestLeg([0, 0], [[0, 0, 0]])).toBeNull();
  });

  it("takes bearings clockwise from true north", () => {
    expect(bearingDeg([0, 0], [0, 1], 0)).toBe(0);
    expect(bearingDeg([0, 0], [1, 0], 0)).toBe(90);
    expect(bearingDeg([0, 0], [0, 1], 350)).toBe(350);
    expect(bearingDeg([0, 0], [1, 0], 350)).toBe(80);
  });
});
