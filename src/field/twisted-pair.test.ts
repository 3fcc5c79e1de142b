import { describe, expect, it } from "vitest";
import { MU_0 } from "../domain/units";
import { sectionFrames } from "./section-frames";
import { SEGMENT_STRIDE } from "./segment";
import { traceRows, twistedSet, type TwistedLine } from "./twisted-pair";
import type { Vector } from "./vector";

const LAY_M = 0.2;

function line(path: Vector[], p: number): TwistedLine {
  const framed = sectionFrames(path);
  if (!framed.ok) throw new Error(framed.message);
  return { legs: framed.frames.legs, p, q: 0, layM: LAY_M, radiusM: 1e-4, share: 1 };
}

const straight: Vector[] = [
  [-5, 0, 0],
  [5, 0, 0],
];

function pairField(path: Vector[], at: Vector): Vector {
  const out = new Float64Array(3);
  const back = new Float64Array(3);
  twistedSet([line(path, -0.01)]).addField(...at, out, 0);
  twistedSet([line(path, 0.01)]).addField(...at, back, 0);
  return [(out[0] ?? 0) - (back[0] ?? 0), (out[1] ?? 0) - (back[1] ?? 0), (out[2] ?? 0) - (back[2] ?? 0)];
}

function trace(path: Vector[], at: Vector): number[][] {
  const rows = new Float64Array(SEGMENT_STRIDE * 2000);
  const count = traceRows(line(path, -0.01), at, rows);
  return Array.from({ length: count }, (_, i) => [
    ...rows.subarray(SEGMENT_STRIDE * i, SEGMENT_STRIDE * i + 6),
  ]);
}

describe("twistedSet", () => {
  it("runs unbroken from end to end, over bends too", () => {
    for (const path of [
      straight,
      [
        [0, 0, 0],
        [3, 0, 0],
        [3, 2, 0],
        [3, 2, 1],
      ] as Vector[],
      [
        [0, 0, 0],
        [0.3, 0, 0],
      ] as Vector[],
    ]) {
      const rows = trace(path, [2.9, 0.5, 0.2]);
      expect(rows[0]?.slice(0, 3)).toEqual(path[0]);
      expect(rows[rows.length - 1]?.slice(3)).toEqual(path[path.length - 1]);
      rows.slice(1).forEach((row, i) => expect(row.slice(0, 3)).toEqual(rows[i]?.slice(3)));
    }
  });

  it("turns right-handed about the path, once a lay", () => {
    const middle = trace(straight, [0, 1, 0])
      .map((row) => row.slice(0, 3))
      .filter(([x]) => Math.abs(x ?? 9) < 0.3);
    const angles = middle.map(([, y, z]) => Math.atan2(z ?? 0, y ?? 0));
    let turned = 0;
    angles.slice(1).forEach((angle, i) => {
      const step = angle - (angles[i] ?? 0);
      turned += step - 2 * Math.PI * Math.round(step / (2 * Math.PI));
    });
    // About +x, y turns towards z: right-handed.
    const advance = (middle[middle.length - 1]?.[0] ?? 0) - (middle[0]?.[0] ?? 0);
    expect(turned / (2 * Math.PI)).toBeCloseTo(advance / LAY_M, 6);
  });

  it("decays by exp(−2π) a lay and more, far below what a cut end would give", () => {
    const size = (r: number) => Math.hypot(...pairField(straight, [0, r, 0]));
    expect(size(0.3) / size(0.1)).toBeLessThan(Math.exp(-2 * Math.PI));
    // Three lays away the trace's own tapered ends are all that is left, 80 dB and more below a parallel pair.
    expect(size(0.6)).toBeLessThan((1e-4 * MU_0 * 0.02) / (2 * Math.PI * 0.36));
  });
});
