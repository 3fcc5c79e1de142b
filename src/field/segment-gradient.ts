import { MU_0 } from "../domain/units";
import { SEGMENT_STRIDE, type SegmentRows } from "./segment";

const SCALE = MU_0 / (4 * Math.PI);

/**
 * Adds to `jacobian[at..at+8]` (row by row, ∂B_i/∂x_j at 3i + j, T/m) the gradient at (x, y, z) of the rows
 * `first` ≤ row < `last`, for 1 A in the set: the derivative in closed form of what `addSegmentField` computes, inside of conductors too.
 *
 * With B = (μ₀I/4π) c F, c = ℓ × a: where a·b ≥ 0, F = (1/|a| + 1/|b|)/D with D = |a||b| + a·b is differentiated as it
 * stands; beside the segment, where D loses digits, F = G/ℓ with G = (α/|a| − β/|b|)/ρ², α and β the positions along
 * the axis from start and end.
 */
export function addSegmentGradient(
  rows: SegmentRows,
  first: number,
  last: number,
  x: number,
  y: number,
  z: number,
  jacobian: Float64Array,
  at: number,
): void {
  for (let i = first * SEGMENT_STRIDE; i < last * SEGMENT_STRIDE; i += SEGMENT_STRIDE) {
    const x1 = rows[i] as number;
    const y1 = rows[i + 1] as number;
    const z1 = rows[i + 2] as number;
    const x2 = rows[i + 3] as number;
    const y2 = rows[i + 4] as number;
    const z2 = rows[i + 5] as number;
    const r2 = (rows[i + 6] as number) ** 2;
    const weight = SCALE * (rows[i + 7] as number);
    const ax = x - x1;
    const ay = y - y1;
    const az = z - z1;
    const bx = x - x2;
    const by = y - y2;
    const bz = z - z2;
    const lx = x2 - x1;
    const ly = y2 - y1;
    const lz = z2 - z1;
    const a2 = ax * ax + ay * ay + az * az;
    const b2 = bx * bx + by * by + bz * bz;
    const product = Math.sqrt(a2) * Math.sqrt(b2);
    if (product === 0) continue;
    const nearStart = a2 <= b2;
    const sx = nearStart ? ax : bx;
    const sy = nearStart ? ay : by;
    const sz = nearStart ? az : bz;
    const cx = ly * sz - lz * sy;
    const cy = lz * sx - lx * sz;
    const cz = lx * sy - ly * sx;
    const c2 = cx * cx + cy * cy + cz * cz;
    const l2 = lx * lx + ly * ly + lz * lz;
    const lengthA = Math.sqrt(a2);
    const lengthB = Math.sqrt(b2);
    const inner = ax * bx + ay * by + az * bz;
    // No gradient is told on a line without thickness, nor of a segment without length.
    if (l2 === 0 || (c2 === 0 && r2 === 0 && inner < 0)) continue;
    const alongL = ax * lx + ay * ly + az * lz;
    const pastStart = alongL < 0;
    const beside = !pastStart && bx * lx + by * ly + bz * lz <= 0;
    const inside = c2 < r2 * l2;
    const a3 = 1 / (a2 * lengthA);
    const b3 = 1 / (b2 * lengthB);

    let f: number;
    let fx: number;
    let fy: number;
    let fz: number;
    // ρ⃗ = (c × ℓ)/ℓ², from c, which keeps its digits beside long segments.
    const px = (cy * lz - cz * ly) / l2;
    const py = (cz * lx - cx * lz) / l2;
    const pz = (cx * ly - cy * lx) / l2;
    if (inner < 0) {
      const l = Math.sqrt(l2);
      const alpha = alongL / l;
      const beta = (bx * lx + by * ly + bz * lz) / l;
      const spread = alpha / lengthA - beta / lengthB;
      const slope = alpha * a3 - beta * b3;
      const rho2 = c2 / l2;
      const divisor = inside ? r2 : rho2;
      f = spread / (l * divisor);
      const axial = (inside ? rho2 / r2 : 1) * (a3 - b3);
      const radial = inside ? slope / r2 : (2 * f * l + slope) / rho2;
      fx = ((axial * lx) / l - radial * px) / l;
      fy = ((axial * ly) / l - radial * py) / l;
      fz = ((axial * lz) / l - radial * pz) / l;
    } else {
      const d = product + inner;
      const s = 1 / lengthA + 1 / lengthB;
      const turn = (s * (lengthA + lengthB)) / (d * d);
      f = s / d;
      const ofA = a3 / d + turn / lengthA;
      const ofB = b3 / d + turn / lengthB;
      fx = -(ofA * ax + ofB * bx);
      fy = -(ofA * ay + ofB * by);
      fz = -(ofA * az + ofB * bz);
      const nearest2 = pastStart ? a2 : b2;
      const q = beside ? c2 / l2 / r2 : nearest2 / r2;
      if (inside && q < 1) {
        const ex = beside ? px : sx;
        const ey = beside ? py : sy;
        const ez = beside ? pz : sz;
        fx = q * fx + (2 * f * ex) / r2;
        fy = q * fy + (2 * f * ey) / r2;
        fz = q * fz + (2 * f * ez) / r2;
        f *= q;
      }
    }
    const wf = weight * f;
    const gx = weight * fx;
    const gy = weight * fy;
    const gz = weight * fz;
    jacobian[at] = (jacobian[at] as number) + cx * gx;
    jacobian[at + 1] = (jacobian[at + 1] as number) + cx * gy - lz * wf;
    jacobian[at + 2] = (jacobian[at + 2] as number) + cx * gz + ly * wf;
    jacobian[at + 3] = (jacobian[at + 3] as number) + cy * gx + lz * wf;
    jacobian[at + 4] = (jacobian[at + 4] as number) + cy * gy;
    jacobian[at + 5] = (jacobian[at + 5] as number) + cy * gz - lx * wf;
    jacobian[at + 6] = (jacobian[at + 6] as number) + cz * gx - ly * wf;
    jacobian[at + 7] = (jacobian[at + 7] as number) + cz * gy + lx * wf;
    jacobian[at + 8] = (jacobian[at + 8] as number) + cz * gz;
  }
}
