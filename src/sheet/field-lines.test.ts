import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fieldLines, hatching, labelPlaces, roundLevels, valueAt, type FieldGrid } from "./field-lines";

/** Values of a function of the place on a grid of 61 × 41 points, 0.1 m apart. */
function gridOf(valueOf: (x: number, y: number) => number): FieldGrid {
  const [columns, rows, stepM, x0M, y0M] = [61, 41, 0.1, -3, -2];
  const values = Float64Array.from({ length: columns * rows }, (_, k) =>
    valueOf(x0M + (k % columns) * stepM, y0M + Math.floor(k / columns) * stepM),
  );
  return { x0M, y0M, stepM, columns, rows, values };
}

/** As around a long straight conductor: circles of radius 1 / level. */
const around = gridOf((x, y) => 1 / Math.max(0.05, Math.hypot(x, y)));

describe("field lines", () => {
  it("lie where the value is: circles around a conductor", () => {
    const [line] = fieldLines(around, [0.8]);
    const places = (line?.pieces ?? []).flat();
    expect(places.length).toBeGreaterThan(20);
    for (const [x, y] of places) expect(Math.hypot(x, y)).toBeCloseTo(1.25, 2);
  });

  it("do not run along the edge of the map", () => {
    const [line] = fieldLines(around, [0.3]);
    for (const place of (line?.pieces ?? []).flatMap((piece) => piece.slice(1, -1))) {
      expect(Math.abs(place[0])).toBeLessThan(3);
      expect(Math.abs(place[1])).toBeLessThan(2);
    }
  });

  it("have round levels within the values", () => {
    expect(roundLevels(1.5e-7, 3e-6)).toEqual([2e-7, 5e-7, 1e-6, 2e-6]);
    expect(roundLevels(0, 0)).toEqual([]);
    expect(roundLevels(0, 1e-6, 3)).toHaveLength(3);
  });

  it("give the value at the pointer, exact for a plane, none outside", () => {
    const plane = gridOf((x, y) => 2 * x - 3 * y + 1);
    fc.assert(
      fc.property(
        fc.double({ min: -2.99, max: 2.99, noNaN: true }),
        fc.double({ min: -1.99, max: 1.99, noNaN: true }),
        (x, y) => {
          expect(valueAt(plane, [x, y])).toBeCloseTo(2 * x - 3 * y + 1, 9);
        },
      ),
    );
    expect(valueAt(plane, [3.2, 0])).toBeNull();
  });

  it("are hatched on the side where the value is greater", () => {
    const [line] = fieldLines(around, [0.8]);
    const strokes = (line?.pieces ?? []).flatMap((piece) => hatching(around, piece, 0.2, 0.1));
    expect(strokes.length).toBeGreaterThan(30);
    for (const [from, to] of strokes) expect(Math.hypot(...to)).toBeLessThan(Math.hypot(...from));
  });

  it("are labelled where there is room", () => {
    const piece = Array.from({ length: 11 }, (_, i) => [i, 0] as const);
    expect(labelPlaces(piece, 20)).toEqual([]);
    expect(labelPlaces(piece, 2)).toHaveLength(1);
    expect(labelPlaces(piece, 1)).toHaveLength(3);
  });
});
