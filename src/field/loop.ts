import { MU_0 } from "../domain/units";
import type { ConductorSet } from "./conductor-set";
import { completeElliptic } from "./elliptic";
import { along, dot, scale, subtract, unit, type Vector } from "./vector";

/** Field of a circular loop for 1 A in its meridian plane, with what its gradient needs. */
interface LoopField {
  /** B_ρ/ρ, T/m. */
  radialSlope: number;
  /** B_z, T. */
  axial: number;
  /** ∂B_z/∂ρ = ∂B_ρ/∂z and ∂B_z/∂z, T/m. */
  axialByRho: number;
  axialByZ: number;
}

/** Points on the wire itself are moved this share of the loop's radius off it. */
const WIRE_CLEARANCE = 1e-9;

/**
 * A circular filament of radius a (m) at axial distance z and radial distance ρ, 1 A right-handed about the axis: complete elliptic
 * integrals (Smythe, Static and Dynamic Electricity; Jackson 5.5) with α² = (a − ρ)² + z², β² = (a + ρ)² + z², m = 4aρ/β²:
 * B_z = (μ₀I/2πβ)[2a(a − ρ)E/α² + mD], B_ρ/ρ = (4μ₀Ia²z/πβ⁵)(D − C)/(1 − m), which keep their digits on the axis and far away.
 */
export function loopField(a: number, rho: number, z: number): LoopField {
  const alpha2 = Math.max((a - rho) ** 2 + z * z, (WIRE_CLEARANCE * a) ** 2);
  const beta2 = (a + rho) ** 2 + z * z;
  const beta = Math.sqrt(beta2);
  const m = (4 * a * rho) / beta2;
  const rest = alpha2 / beta2;
  const { e, b, c, d } = completeElliptic(Math.min(m, 1 - 1e-18));
  const g = MU_0 / (2 * Math.PI * beta);
  const p = (a * a - rho * rho - z * z) / alpha2;
  const axial = g * ((2 * a * (a - rho) * e) / alpha2 + m * d);
  const radialSlope = (4 * MU_0 * a * a * z * (d - c)) / (Math.PI * beta2 * beta2 * beta * rest);

  const derivative = (betaBy: number, alpha2By: number, squaredBy: number, rhoBy: number) => {
    const mBy = (4 * a * rhoBy) / beta2 - (2 * m * betaBy) / beta;
    const pBy = -squaredBy / alpha2 - (p * alpha2By) / alpha2;
    return (-axial * betaBy) / beta + g * (pBy * e - (p * d * mBy) / 2 + (b * mBy) / (2 * rest));
  };
  return {
    radialSlope,
    axial,
    axialByRho: derivative((a + rho) / beta, 2 * (rho - a), 2 * rho, 1),
    axialByZ: derivative(z / beta, 2 * z, 2 * z, 0),
  };
}

/** Turns of radius a (m) about `axis`, each with its centre: one set that carries 1 A in every turn. */
export function loopSet(centres: readonly Vector[], axis: Vector, radiusM: number): ConductorSet {
  const n = unit(axis);
  const meridian = (centre: Vector, x: number, y: number, z: number) => {
    const from = subtract([x, y, z], centre);
    const height = dot(from, n);
    const radial = along(from, n, -height);
    const rho = Math.hypot(...radial);
    return { radial, rho, field: loopField(radiusM, rho, height) };
  };
  return {
    rows: null,
    addField: (x, y, z, out, at) => {
      for (const centre of centres) {
        const { radial, field } = meridian(centre, x, y, z);
        for (let i = 0; i < 3; i++) {
          const part = (radial[i] as number) * field.radialSlope + (n[i] as number) * field.axial;
          out[at + i] = (out[at + i] as number) + part;
        }
      }
    },
    addGradient: (x, y, z, out, at) => {
      for (const centre of centres) {
        const { radial, rho, field } = meridian(centre, x, y, z);
        const e: Vector = rho > 0 ? scale(radial, 1 / rho) : [0, 0, 0];
        addMeridianGradient(field, e, n, out, at);
      }
    },
  };
}

/** With e outward and n along the axis: ∂B_ρ/∂ρ e eᵀ + (B_ρ/ρ)(1 − n nᵀ − e eᵀ) + ∂B_z/∂ρ (e nᵀ + n eᵀ) + ∂B_z/∂z n nᵀ. */
function addMeridianGradient(field: LoopField, e: Vector, n: Vector, out: Float64Array, at: number): void {
  const { radialSlope, axialByRho, axialByZ } = field;
  // No divergence: ∂B_ρ/∂ρ = −B_ρ/ρ − ∂B_z/∂z.
  const excess = -2 * radialSlope - axialByZ;
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j < 3; j++) {
      const [ei, ej, ni, nj] = [e[i] as number, e[j] as number, n[i] as number, n[j] as number];
      const diagonal = i === j ? radialSlope : 0;
      const part =
        diagonal + excess * ei * ej + axialByRho * (ei * nj + ni * ej) + (axialByZ - radialSlope) * ni * nj;
      out[at + 3 * i + j] = (out[at + 3 * i + j] as number) + part;
    }
  }
}
