import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { MU_0 } from "~/domain/units";
import { loopField, loopSet } from "~/field/loop";
import type { Vector } from "~/field/vector";
import { turnCentres } from "~/screening/compile-equipment";

const NODES = 2000;

/** B_ρ and B_z (T) of a loop for 1 A: Biot and Savart over the angle by the trapezoidal rule, which converges exponentially on a period. */
function quadrature(a: number, rho: number, z: number): [number, number] {
  let [radial, axial] = [0, 0];
  for (let node = 0; node < NODES; node++) {
    const cos = Math.cos((2 * Math.PI * node) / NODES);
    const cubed = (a * a + rho * rho + z * z - 2 * a * rho * cos) ** 1.5;
    radial += (z * cos) / cubed;
    axial += (a - rho * cos) / cubed;
  }
  const scale = (MU_0 * a) / (2 * NODES);
  return [scale * radial, scale * axial];
}

/** Field (T) on the axis of a current sheet, 1 A-turn over length L and radius a, at z from its middle (standard textbook form, from memory). */
function sheetAxisT(a: number, lengthM: number, z: number): number {
  const cosine = (over: number) => over / Math.hypot(a, over);
  return (MU_0 / (2 * lengthM)) * (cosine(z + lengthM / 2) - cosine(z - lengthM / 2));
}

const solenoidAxisT = (turns: number, a: number, lengthM: number, z: number): number =>
  turnCentres([0, 0, 0], [0, 0, 1], lengthM, turns).reduce(
    (sum, centre) => sum + loopField(a, 0, z - centre[2]).axial / turns,
    0,
  );

const size = fc.double({ min: 0.05, max: 2, noNaN: true });
const place = fc.double({ min: -3, max: 3, noNaN: true });

describe("the loop off its axis", () => {
  it("is what integrating around it gives, complete elliptic integrals or not", () => {
    fc.assert(
      fc.property(size, size, place, (a, rho, z) => {
        // Nearer to the wire the rule needs more nodes than it has.
        fc.pre(Math.hypot(a - rho, z) > 0.05 * a);
        const [radial, axial] = quadrature(a, rho, z);
        const field = loopField(a, rho, z);
        const whole = Math.hypot(radial, axial);
        expect(Math.abs(field.radialSlope * rho - radial)).toBeLessThanOrEqual(1e-11 * whole);
        expect(Math.abs(field.axial - axial)).toBeLessThanOrEqual(1e-11 * whole);
      }),
      { numRuns: 300 },
    );
  }, 30_000);
});

describe("a coil of many turns", () => {
  it("meets the finite solenoid's closed form on the axis, in the middle, at the ends and outside, as the square of the pitch", () => {
    fc.assert(
      fc.property(size, size, place, (a, lengthM, z) => {
        const closed = sheetAxisT(a, lengthM, z);
        const errorOf = (turns: number) => Math.abs(solenoidAxisT(turns, a, lengthM, z) / closed - 1);
        // Midpoint rule: pitch²/24 times the difference of the loop's slopes at both ends, each at most 0.43 μ₀/a².
        const bound = (turns: number) =>
          (((lengthM / turns) ** 2 / 24) * 2 * 0.43 * MU_0) / (a * a * closed * lengthM);
        for (const turns of [50, 400]) expect(errorOf(turns)).toBeLessThanOrEqual(bound(turns) + 1e-12);
      }),
    );
  });

  it("has a field off the axis whose flux through every cross-section is what its walls let out", () => {
    const [a, lengthM] = [0.2, 0.6];
    const set = loopSet(turnCentres([0, 0, 0], [0, 0, 1], lengthM, 60), [0, 0, 1], a);
    const at = (x: number, z: number): Vector => {
      const out = new Float64Array(3);
      set.addField(x, 0, z, out, 0);
      return [out[0] ?? 0, out[1] ?? 0, out[2] ?? 0];
    };
    // A cylinder of radius 0.1 m from z = 0.05 m to 0.4 m: the flux through its ends and its wall cancel.
    const [radiusM, low, high, steps] = [0.1, 0.05, 0.4, 400];
    let [ends, wall, largest] = [0, 0, 0];
    for (let step = 0; step < steps; step++) {
      const share = (step + 0.5) / steps;
      const rho = radiusM * share;
      const ring = (2 * Math.PI * rho * radiusM) / steps;
      ends += ring * (at(rho, high)[2] - at(rho, low)[2]);
      largest += ring * at(rho, low)[2];
      const z = low + (high - low) * share;
      wall += (2 * Math.PI * radiusM * (high - low) * at(radiusM, z)[0]) / steps;
    }
    expect(Math.abs(ends + wall)).toBeLessThan(1e-5 * largest);
  });
});
