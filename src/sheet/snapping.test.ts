import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { defaultSnap, noModifiers, snapPoint, type SnapSurroundings } from "./snapping";

const around = (part: Partial<SnapSurroundings> = {}): SnapSurroundings => ({
  snap: defaultSnap,
  reachM: 0.2,
  vertices: [],
  trail: [],
  ...part,
});

const coordinate = fc.double({ min: -100, max: 100, noNaN: true });

describe("snapping", () => {
  it("prefers the nearest vertex in reach and takes its height", () => {
    const vertices = [
      [1, 1, 2.8],
      [1.1, 1, 0.4],
    ] as const;
    expect(snapPoint([1.09, 1.02], noModifiers, around({ vertices }))).toEqual({
      at: [1.1, 1],
      to: "vertex",
      heightM: 0.4,
    });
    expect(snapPoint([1.5, 1], noModifiers, around({ vertices })).to).toBe("grid");
  });

  it("holds a right angle to the sheet and to the last leg", () => {
    const trail = [
      [0, 0, 1],
      [3, 4, 1],
    ] as const;
    const straightUp = snapPoint([3.05, 7.02], noModifiers, around({ trail }));
    expect(straightUp.to).toBe("right angle");
    expect(straightUp.at[0]).toBe(3);
    const [x, y] = snapPoint([3 - 4 + 0.03, 4 + 3 + 0.03], noModifiers, around({ trail })).at;
    expect((x - 3) * 3 + (y - 4) * 4).toBeCloseTo(0, 9);
  });

  it("looks past a riser for the direction of the last leg", () => {
    const trail = [
      [0, 0, 3],
      [1, 1, 3],
      [1, 1, 0],
    ] as const;
    const [x, y] = snapPoint([4.02, 4], noModifiers, around({ trail })).at;
    expect(y).toBeCloseTo(x, 9);
  });

  it("takes the right angle from anywhere while shift is held, and nothing while alt is", () => {
    const trail = [[0, 0, 0]] as const;
    expect(snapPoint([5, 3], { ...noModifiers, shift: true }, around({ trail })).at).toEqual([5, 0]);
    expect(snapPoint([5.033, 0.01], { ...noModifiers, alt: true }, around({ trail })).at).toEqual([
      5.033, 0.01,
    ]);
  });

  it("puts a point on the grid no further than half a step away", () => {
    fc.assert(
      fc.property(coordinate, coordinate, fc.constantFrom(0.05, 0.1, 0.25, 1), (x, y, gridM) => {
        const { at } = snapPoint([x, y], noModifiers, around({ snap: { ...defaultSnap, gridM } }));
        for (const [snapped, given] of [
          [at[0], x],
          [at[1], y],
        ] as const) {
          expect(Math.abs(snapped - given)).toBeLessThanOrEqual(gridM / 2 + 1e-6);
          expect(Math.abs(snapped / gridM - Math.round(snapped / gridM))).toBeLessThan(1e-4);
        }
      }),
    );
  });

  it("leaves the point alone when everything is off", () => {
    const snap = { vertices: false, rightAngles: false, gridM: 0 };
    expect(snapPoint([0.123, 0.456], noModifiers, around({ snap, trail: [[0, 0, 0]] })).at).toEqual([
      0.123, 0.456,
    ]);
  });
});
