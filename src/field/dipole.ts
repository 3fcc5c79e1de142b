import type { ConductorSet } from "./conductor-set";
import { unit, type Vector } from "./vector";

/** The nearest that a dipole is looked at, metres. */
const CLOSEST_M = 1e-6;

/**
 * A dipole known by the largest field found at a distance, which is that on its axis: |m| = 2πd³B/μ₀, so
 * B(r) = (B d³/2)(3(m̂·r)r − r² m̂)/r⁵. As a set its "1 A" is the reading itself.
 */
export function dipoleSet(
  centre: Vector,
  direction: Vector,
  distanceM: number,
  fieldT: number,
): ConductorSet {
  const m = unit(direction);
  const k = (fieldT * distanceM ** 3) / 2;
  return {
    rows: null,
    addField: (x, y, z, out, at) => {
      const r: Vector = [x - centre[0], y - centre[1], z - centre[2]];
      const size = Math.max(Math.hypot(...r), CLOSEST_M);
      const mr = m[0] * r[0] + m[1] * r[1] + m[2] * r[2];
      for (let i = 0; i < 3; i++) {
        const part = (k * (3 * mr * (r[i] as number) - size * size * (m[i] as number))) / size ** 5;
        out[at + i] = (out[at + i] as number) + part;
      }
    },
    addGradient: (x, y, z, out, at) => {
      const r: Vector = [x - centre[0], y - centre[1], z - centre[2]];
      const size = Math.max(Math.hypot(...r), CLOSEST_M);
      const mr = m[0] * r[0] + m[1] * r[1] + m[2] * r[2];
      const scale = (3 * k) / size ** 5;
      for (let i = 0; i < 3; i++) {
        for (let j = 0; j < 3; j++) {
          const [ri, rj, mi, mj] = [r[i] as number, r[j] as number, m[i] as number, m[j] as number];
          const part = mj * ri + mi * rj + (i === j ? mr : 0) - (5 * mr * ri * rj) / (size * size);
          out[at + 3 * i + j] = (out[at + 3 * i + j] as number) + scale * part;
        }
      }
    },
  };
}
