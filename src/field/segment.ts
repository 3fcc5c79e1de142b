import { MU_0 } from "../domain/units";

/**
 * Packed straight segments, `SEGMENT_STRIDE` numbers a row: start x, y, z and end x, y, z (m), conductor radius (m),
 * share of the set's current that flows from start to end.
 */
export type SegmentRows = Float64Array;
export const SEGMENT_STRIDE = 8;

const SCALE = MU_0 / (4 * Math.PI);

/**
 * Adds to `out[at..at+2]` the flux density (T) at (x, y, z) (m) of the rows `first` ≤ row < `last`, for 1 A in the set.
 *
 * Biot–Savart in closed form, B = (μ₀I/4π)(a × b)(|a|+|b|)/(|a||b|(|a||b| + a·b)) with a, b from the segment's ends to the
 * point (Hanson and Hirshman, Phys. Plasmas 9, 4410 (2002)), evaluated so that no digits are lost beside long segments:
 * a × b = ℓ × (shorter of a, b), and where a·b < 0, 1/(|a||b| + a·b) = (|a||b| − a·b)/|a × b|².
 * Nearer to the axis than the radius R the field is that times (ρ² + e²)/R², e the overhang past the segment's end
 * (uniform current density). Zero on the segment's own end points, and on its line where it has no thickness or no length.
 */
export function addSegmentField(
  rows: SegmentRows,
  first: number,
  last: number,
  x: number,
  y: number,
  z: number,
  out: Float64Array,
  at: number,
): void {
  let sumX = 0;
  let sumY = 0;
  let sumZ = 0;
  for (let i = first * SEGMENT_STRIDE; i < last * SEGMENT_STRIDE; i += SEGMENT_STRIDE) {
    const x1 = rows[i] as number;
    const y1 = rows[i + 1] as number;
    const z1 = rows[i + 2] as number;
    const x2 = rows[i + 3] as number;
    const y2 = rows[i + 4] as number;
    const z2 = rows[i + 5] as number;
    const radius = rows[i + 6] as number;
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
    const product = lengthA * lengthB;
    const inner = ax * bx + ay * by + az * bz;
    let inverse: number;
    if (c2 < radius * radius * l2) {
      if (product === 0) continue;
      const pastStart = ax * lx + ay * ly + az * lz < 0;
      const pastEnd = bx * lx + by * ly + bz * lz > 0;
      const overhang2 = pastStart ? a2 : pastEnd ? b2 : -1;
      inverse = insideInverse(c2, l2, radius * radius, product, inner, overhang2);
    } else if (c2 === 0) {
      continue;
    } else {
      inverse = inner < 0 ? (product - inner) / c2 : 1 / (product + inner);
    }
    const k = (SCALE * (rows[i + 7] as number) * (lengthA + lengthB) * inverse) / product;
    sumX += k * cx;
    sumY += k * cy;
    sumZ += k * cz;
  }
  out[at] = (out[at] as number) + sumX;
  out[at + 1] = (out[at + 1] as number) + sumY;
  out[at + 2] = (out[at + 2] as number) + sumZ;
}

/**
 * 1/(|a||b| + a·b) times min(1, (ρ² + e²)/R²) for a point whose distance from the axis is below R; finite on the axis.
 * `overhang2` is the squared distance to the end that the point lies past, or −1 beside the segment.
 */
function insideInverse(
  c2: number,
  l2: number,
  r2: number,
  product: number,
  inner: number,
  overhang2: number,
): number {
  if (overhang2 >= 0) return Math.min(1, overhang2 / r2) / (product + inner);
  return inner < 0 ? (product - inner) / (l2 * r2) : c2 / (l2 * r2 * (product + inner));
}
