import { describe, expect, it } from "vitest";
import { fillSetsField, packSets, segmentSet } from "./conductor-set";
import { dipoleSet } from "./dipole";

describe("fillSetsField", () => {
  it("gives every set at every point what addField gives, to the bit, with and without rows", () => {
    const sets = [
      segmentSet(Float64Array.of(0, 0, 0, 5, 1, 0, 0.01, 1, 5, 1, 0, 5, 7, 2, 0.01, 0.5)),
      dipoleSet([1, 2, 3], [0, 1, 1], 0.5, 1e-5),
      segmentSet(Float64Array.of(0, 0, 1, 0, 4, 1, 0.02, -1)),
    ];
    const points = Float64Array.of(1, 1, 1, 0.001, 2, 1.001, -3, 4, 0.5);
    const out = new Float64Array(27).fill(7);
    fillSetsField(packSets(sets), points, out);
    const expected = sets.flatMap((set) =>
      [0, 3, 6].flatMap((p) => {
        const field = new Float64Array(3);
        set.addField(points[p] as number, points[p + 1] as number, points[p + 2] as number, field, 0);
        return [...field];
      }),
    );
    expect([...out]).toEqual(expected);
  });
});
