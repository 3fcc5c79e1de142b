import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { MU_0 } from "../domain/units";
import { dipoleSet } from "./dipole";
import { completeElliptic } from "./elliptic";
import { loopField, loopSet } from "./loop";
import type { ConductorSet } from "./conductor-set";
import { along, distance, scale, subtract, unit, type Vector } from "./vector";

function fieldOf(set: ConductorSet, at: Vector): Vector {
  const out = new Float64Array(3);
  set.addField(...at, out, 0);
  return [out[0] ?? 0, out[1] ?? 0, out[2] ?? 0];
}

function gradientOf(set: ConductorSet, at: Vector): Float64Array {
  const out = new Float64Array(9);
  set.addGradient(...at, out, 0);
  return out;
}

/** Compares the gradient with central differences of the field. */
function expectDerivative(set: ConductorSet, at: Vector, stepM: number, relative: number): void {
  const jacobian = gradientOf(set, at);
  const size = Math.hypot(...jacobian);
  for (const j of [0, 1, 2]) {
    const axis: Vector = [j === 0 ? 1 : 0, j === 1 ? 1 : 0, j === 2 ? 1 : 0];
    const difference = subtract(fieldOf(set, along(at, axis, stepM)), fieldOf(set, along(at, axis, -stepM)));
    difference.forEach((change, i) => {
      expect(Math.abs(change / (2 * stepM) - (jacobian[3 * i + j] ?? 0))).toBeLessThanOrEqual(
        relative * size,
      );
    });
  }
  expect(Math.abs((jacobian[0] ?? 0) + (jacobian[4] ?? 0) + (jacobian[8] ?? 0))).toBeLessThanOrEqual(
    1e-9 * size,
  );
}

describe("completeElliptic", () => {
  it("agrees on both sides of its change of method and with tabled values", () => {
    const below = completeElliptic(0.3 - 1e-12);
    const above = completeElliptic(0.3 + 1e-12);
    for (const key of ["k", "e", "b", "c", "d"] as const) expect(below[key] / above[key]).toBeCloseTo(1, 11);
    // Abramowitz and Stegun, table 17.1, m = 0.5.
    expect(completeElliptic(0.5).k).toBeCloseTo(1.854074677301372, 13);
    expect(completeElliptic(0.5).e).toBeCloseTo(1.350643881047675, 13);
    expect(completeElliptic(0).c).toBeCloseTo(Math.PI / 16, 14);
  });
});

describe("loopField", () => {
  it("is μ₀a²/2(a² + z²)^{3/2} on the axis", () => {
    for (const z of [0, 0.3, 50]) {
      const { axial } = loopField(0.4, 0, z);
      expect(axial / ((MU_0 * 0.16) / (2 * Math.hypot(0.4, z) ** 3))).toBeCloseTo(1, 11);
    }
  });

  it("keeps its digits close to the axis and far away", () => {
    const { radialSlope } = loopField(0.5, 1e-9, 0.5);
    // On the axis B_ρ/ρ = −½ ∂B_z/∂z = ¾ μ₀a²z/(a² + z²)^{5/2}.
    expect(radialSlope / ((0.75 * MU_0 * 0.25 * 0.5) / 0.5 ** 2.5)).toBeCloseTo(1, 12);
    const far = loopField(0.1, 600, 800);
    const moment = (MU_0 * 0.01) / 4 / 1000 ** 3;
    expect(far.axial / (moment * (3 * 0.64 - 1))).toBeCloseTo(1, 7);
    expect((far.radialSlope * 600) / (moment * 3 * 0.48)).toBeCloseTo(1, 7);
  });

  it("is what a polygon of many sides gives", () => {
    const a = 0.3;
    const sides = 20000;
    const [x, z] = [0.45, 0.2];
    const sum = [0, 0, 0];
    for (let i = 0; i < sides; i++) {
      const angle = (2 * Math.PI * (i + 0.5)) / sides;
      const dl: Vector = scale([-Math.sin(angle), Math.cos(angle), 0], (2 * Math.PI * a) / sides);
      const r: Vector = [x - a * Math.cos(angle), -a * Math.sin(angle), z];
      const k = MU_0 / (4 * Math.PI * Math.hypot(...r) ** 3);
      sum[0] = (sum[0] ?? 0) + k * (dl[1] * r[2] - dl[2] * r[1]);
      sum[2] = (sum[2] ?? 0) + k * (dl[0] * r[1] - dl[1] * r[0]);
    }
    const field = loopField(a, x, z);
    expect((field.radialSlope * x) / (sum[0] ?? 1)).toBeCloseTo(1, 7);
    expect(field.axial / (sum[2] ?? 1)).toBeCloseTo(1, 7);
  });
});

const coordinate = fc.double({ min: -2, max: 2, noNaN: true });
const vector = fc.tuple(coordinate, coordinate, coordinate);

describe("loopSet and dipoleSet", () => {
  it("have the gradients that their fields show", () => {
    fc.assert(
      fc.property(vector, vector, (axis, at) => {
        fc.pre(Math.hypot(...axis) > 0.1 && Math.hypot(...at) > 0.05);
        expectDerivative(dipoleSet([0, 0, 0], axis, 1, 1e-6), at, 1e-5, 1e-4);
        const n = unit(axis);
        const height = at[0] * n[0] + at[1] * n[1] + at[2] * n[2];
        const rho = distance(at, scale(n, height));
        fc.pre(Math.hypot(rho - 0.5, height) > 0.05);
        expectDerivative(loopSet([[0, 0, 0]], axis, 0.5), at, 1e-5, 1e-4);
      }),
    );
    expectDerivative(loopSet([[0, 0, 0]], [0, 0, 1], 0.5), [0, 0, 0.3], 1e-5, 1e-6);
  });

  it("see a small loop and a dipole alike", () => {
    const at: Vector = [1, 2, 2];
    const loop = fieldOf(loopSet([[0, 0, 0]], [1, 1, 0], 0.001), at);
    const onAxis = (MU_0 * 1e-6) / 2;
    const dipole = fieldOf(dipoleSet([0, 0, 0], [1, 1, 0], 1, onAxis), at);
    expect(distance(loop, dipole)).toBeLessThan(1e-5 * Math.hypot(...dipole));
  });
});
