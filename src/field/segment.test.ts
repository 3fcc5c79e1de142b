import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { MU_0 } from "../domain/units";
import { addSegmentField, SEGMENT_STRIDE } from "./segment";
import { addSegmentGradient } from "./segment-gradient";
import { along, distance, distanceToLeg, subtract, type Vector } from "./vector";

const row = (from: Vector, to: Vector, radiusM = 1e-3, weight = 1) => [...from, ...to, radiusM, weight];

function field(rows: number[], at: Vector): Vector {
  const out = new Float64Array(3);
  addSegmentField(Float64Array.from(rows), 0, rows.length / SEGMENT_STRIDE, ...at, out, 0);
  return [out[0] ?? 0, out[1] ?? 0, out[2] ?? 0];
}

function gradient(rows: number[], at: Vector): Float64Array {
  const out = new Float64Array(9);
  addSegmentGradient(Float64Array.from(rows), 0, rows.length / SEGMENT_STRIDE, ...at, out, 0);
  return out;
}

const coordinate = fc.double({ min: -20, max: 20, noNaN: true });
const vector = fc.tuple(coordinate, coordinate, coordinate);
const magnitude = (v: Vector) => Math.hypot(...v);
const near = (a: Vector, b: Vector, relative: number, floor: number) =>
  expect(distance(a, b)).toBeLessThanOrEqual(relative * Math.max(magnitude(a), magnitude(b)) + floor);

const legAndPoint = fc.tuple(vector, vector, vector).filter(([from, to]) => distance(from, to) > 1e-3);

describe("addSegmentField", () => {
  it("is unchanged by cutting a segment in two", () => {
    fc.assert(
      fc.property(legAndPoint, fc.double({ min: 0.05, max: 0.95, noNaN: true }), ([from, to, at], share) => {
        const cut = along(from, subtract(to, from), share);
        // Inside the conductor the overhang rule applies to both halves around the cut.
        fc.pre(distanceToLeg(from, to, at) > 2e-3);
        near(field([...row(from, cut), ...row(cut, to)], at), field(row(from, to), at), 1e-10, 1e-19);
      }),
    );
  });

  it("changes sign with the direction of the current", () => {
    fc.assert(
      fc.property(legAndPoint, ([from, to, at]) => {
        const there = field(row(from, to), at);
        const back = field(row(to, from), at);
        near(there, [-back[0], -back[1], -back[2]], 1e-12, 1e-22);
      }),
    );
  });

  it("adds up over segments and their shares of the current", () => {
    fc.assert(
      fc.property(legAndPoint, legAndPoint, ([from, to, at], [from2, to2]) => {
        const both = field([...row(from, to, 1e-3, 0.25), ...row(from2, to2, 1e-3, -3)], at);
        const [a, b] = [field(row(from, to), at), field(row(from2, to2), at)];
        near(both, [0.25 * a[0] - 3 * b[0], 0.25 * a[1] - 3 * b[1], 0.25 * a[2] - 3 * b[2]], 1e-12, 1e-19);
      }),
    );
  });

  it("falls as 1/s when the whole plan grows by s", () => {
    fc.assert(
      fc.property(legAndPoint, fc.double({ min: 0.1, max: 10, noNaN: true }), ([from, to, at], s) => {
        // Nearer, the rounding of the coordinates themselves would be compared.
        fc.pre(distanceToLeg(from, to, at) > 1e-3);
        const grown = (p: Vector): Vector => [p[0] * s, p[1] * s, p[2] * s];
        const large = field(row(grown(from), grown(to), 1e-3 * s), grown(at));
        const small = field(row(from, to), at);
        near(small, grown(large), 1e-9, 1e-17);
      }),
    );
  });

  it("keeps nine digits of a pair 1 mm apart seen from 100 m, 10 m to 100 km long", () => {
    for (const lengthM of [10, 1e3, 1e5]) {
      const half = lengthM / 2;
      const pair = [
        ...row([-half, 0, 5e-4], [half, 0, 5e-4], 1e-4),
        ...row([half, 0, -5e-4], [-half, 0, -5e-4], 1e-4),
      ];
      const [, by] = field(pair, [0, 0, 100]);
      const single = (rM: number) => (-MU_0 * half) / (2 * Math.PI * rM * Math.hypot(half, rM));
      // The difference in closed form, free of cancellation: d/dr of 1/(r √(h² + r²)) integrated over 1 mm (even orders vanish).
      const r = 100;
      const w = Math.hypot(half, r);
      const slope = (MU_0 * half * (half * half + 2 * r * r)) / (2 * Math.PI * r * r * w ** 3);
      expect(single(r)).toBeLessThan(0);
      expect(Math.abs(by + slope * 1e-3) / (slope * 1e-3)).toBeLessThan(1e-9);
    }
  });

  it("keeps its digits 1 mm from a 200 km wire", () => {
    const [, by] = field(row([-1e5, 0, 0], [1e5, 0, 0], 1e-6), [0, 0, 1e-3]);
    expect(Math.abs(by / (MU_0 / (2 * Math.PI * 1e-3)) + 1)).toBeLessThan(1e-12);
  });

  it("grows linearly inside a conductor, is continuous at its surface and finite everywhere", () => {
    const wire = row([-50, 0, 0], [50, 0, 0], 0.03);
    const surface = magnitude(field(wire, [0, 0, 0.03]));
    expect(magnitude(field(wire, [0, 0, 0.015])) / surface).toBeCloseTo(0.5, 6);
    expect(magnitude(field(wire, [0, 0, 0.03 * (1 - 1e-12)])) / surface).toBeCloseTo(1, 9);
    for (const x of [-50, 0, 50, 50.01, 60]) expect(magnitude(field(wire, [x, 0, 0]))).toBe(0);
    expect(magnitude(field(wire, [50.001, 1e-3, 0]))).toBeLessThan(surface);
    expect(magnitude(field(wire, [50, 1e-200, 0]))).toBeLessThan(surface);
  });

  it("gives nothing on the line of a segment without thickness or without length, and leaves the rest as it was", () => {
    const thin = row([0, 0, 0], [1, 2, 3], 0);
    const point = row([4, 5, 6], [4, 5, 6]);
    const rest = row([0, 1, 0], [5, 1, 0]);
    for (const share of [0, 0.25, 0.5, 1, 1.5, -0.5]) {
      const at: Vector = [share, 2 * share, 3 * share];
      expect(field([...thin, ...point, ...rest], at)).toEqual(field(rest, at));
      expect(gradient([...thin, ...point, ...rest], at).every(Number.isFinite)).toBe(true);
    }
    expect(gradient([...thin, ...point, ...rest], [0.5, 1, 1.5])).toEqual(gradient(rest, [0.5, 1, 1.5]));
    expect(field([...point, ...rest], [4, 5, 6])).toEqual(field(rest, [4, 5, 6]));
  });
});

describe("addSegmentGradient", () => {
  it("is the derivative of the field, inside conductors and past their ends too", () => {
    fc.assert(
      fc.property(legAndPoint, fc.constantFrom(1e-3, 0.5, 3), ([from, to, at], radiusM) => {
        const line = distanceToLeg(from, to, at);
        fc.pre(
          line > 1e-2 &&
            Math.abs(line - radiusM) > 0.02 &&
            distance(at, to) > 0.02 &&
            distance(at, from) > 0.02,
        );
        fc.pre(Math.abs(axisDistance(from, to, at) - radiusM) > 0.02);
        fc.pre(Math.abs(overhang(from, to, at)) > 1e-3 && Math.abs(overhang(to, from, at)) > 1e-3);
        const rows = row(from, to, radiusM);
        const jacobian = gradient(rows, at);
        const scaleT = Math.hypot(...jacobian);
        const step = 1e-5 * Math.min(1, line);
        for (const axis of [0, 1, 2]) {
          const move = (by: number): Vector => [
            at[0] + (axis === 0 ? by : 0),
            at[1] + (axis === 1 ? by : 0),
            at[2] + (axis === 2 ? by : 0),
          ];
          const slope = subtract(field(rows, move(step)), field(rows, move(-step)));
          slope.forEach((difference, i) => {
            const error = Math.abs(difference / (2 * step) - (jacobian[3 * i + axis] ?? 0));
            expect(error).toBeLessThanOrEqual(1e-5 * scaleT + 1e-17);
          });
        }
      }),
    );
  });

  it("is free of divergence outside of conductors", () => {
    fc.assert(
      fc.property(legAndPoint, ([from, to, at]) => {
        const j = gradient(row(from, to, 1e-9), at);
        fc.pre(Number.isFinite(Math.hypot(...j)));
        expect(Math.abs((j[0] ?? 0) + (j[4] ?? 0) + (j[8] ?? 0))).toBeLessThanOrEqual(
          1e-9 * Math.hypot(...j),
        );
      }),
    );
  });
});

/** Position along the segment, metres from its start. */
function overhang(from: Vector, to: Vector, at: Vector): number {
  const l = subtract(to, from);
  const a = subtract(at, from);
  return (a[0] * l[0] + a[1] * l[1] + a[2] * l[2]) / distance(from, to);
}

function axisDistance(from: Vector, to: Vector, at: Vector): number {
  const s = overhang(from, to, at) / distance(from, to);
  return distance(at, along(from, subtract(to, from), s));
}
