import { describe, expect, it } from "vitest";
import { MU_0 } from "../../domain/units";
import { fillInfluence, fillPhasorField, segmentKernel } from "./fill-field";

const row = [-1e4, 0, 0, 1e4, 0, 0, 0.01, 1];
const rows = Float64Array.from([...row, ...row]);
const points = Float64Array.from([0, 1, 0, 0, 0, 2]);

describe("the kernel of this thread", () => {
  it("is the SIMD one in Node", () => {
    expect(segmentKernel().name).toBe("simd");
  });

  it("fills the influence block set by set, point by point", () => {
    const out = new Float64Array(12).fill(9);
    fillInfluence(rows, [0, 1, 2], points, out);
    // A long straight wire: μ₀I/2πr, right-handed about +x; 5e-9 of it is missing beyond the ends.
    const at1m = MU_0 / (2 * Math.PI);
    const expected = [0, 0, at1m, 0, -at1m / 2, 0];
    [...expected, ...expected].forEach((value, i) =>
      expect(Math.abs((out[i] ?? NaN) - value)).toBeLessThan(3e-8 * at1m),
    );
  });

  it("fills re and im of x, y, z a point", () => {
    const out = new Float64Array(12).fill(9);
    fillPhasorField(rows, [0, 1, 2], Float64Array.from([3, 0, 0, 5]), points, out);
    const influence = new Float64Array(12);
    fillInfluence(rows, [0, 1, 2], points, influence);
    const g = Array.from(influence.subarray(0, 6));
    expect(Array.from(out)).toEqual(g.flatMap((fieldT) => [3 * fieldT, 5 * fieldT]));
  });

  it("says which array does not fit", () => {
    const out = new Float64Array(12);
    expect(() => fillInfluence(rows, [0, 1, 2], points.subarray(1), out)).toThrow("points holds 5 numbers");
    expect(() => fillInfluence(rows, [0, 1, 3], points, out)).toThrow("setStarts[2] is 3");
    expect(() => fillInfluence(rows, [0, 2, 1], points, out)).toThrow("setStarts[2] is 1");
    expect(() => fillInfluence(rows, [], points, out)).toThrow("setStarts is empty");
    expect(() => fillInfluence(rows, [0, 1, 2], points, out.subarray(1))).toThrow("out holds 11 numbers; 12");
    expect(() => fillPhasorField(rows, [0, 2], new Float64Array(1), points, out)).toThrow(
      "currentsReIm holds 1",
    );
  });
});
