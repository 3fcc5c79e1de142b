import { fillInfluence } from "./kernel/fill-field";
import { addSegmentField, SEGMENT_STRIDE, type SegmentRows } from "./segment";
import { addSegmentGradient } from "./segment-gradient";

/**
 * Conductors that carry one current between them: the column of the influence matrix.
 * Both methods add what 1 A in the set gives at (x, y, z) (m): the flux density (T) to `out[at..at+2]`,
 * the gradient ∂B_i/∂x_j (T/m) to `out[at + 3i + j]`.
 */
export interface ConductorSet {
  addField(x: number, y: number, z: number, out: Float64Array, at: number): void;
  addGradient(x: number, y: number, z: number, out: Float64Array, at: number): void;
  /** Straight segments that are the whole set wherever it is seen from, for the kernel; null where there are none such. */
  readonly rows: SegmentRows | null;
}

/** The rows as one set. */
export function segmentSet(rows: SegmentRows): ConductorSet {
  const count = rows.length / SEGMENT_STRIDE;
  return {
    addField: (x, y, z, out, at) => addSegmentField(rows, 0, count, x, y, z, out, at),
    addGradient: (x, y, z, out, at) => addSegmentGradient(rows, 0, count, x, y, z, out, at),
    rows,
  };
}

/** Sets as the kernel takes them: the rows of all that have rows, one set after another; the others are empty there. */
export interface PackedSets {
  sets: readonly ConductorSet[];
  rows: SegmentRows;
  /** One entry more than sets. */
  setStarts: Int32Array;
}

export function packSets(sets: readonly ConductorSet[]): PackedSets {
  const setStarts = new Int32Array(sets.length + 1);
  sets.forEach((set, k) => {
    setStarts[k + 1] = (setStarts[k] as number) + (set.rows?.length ?? 0) / SEGMENT_STRIDE;
  });
  const rows = new Float64Array(SEGMENT_STRIDE * (setStarts[sets.length] as number));
  sets.forEach((set, k) => {
    if (set.rows) rows.set(set.rows, SEGMENT_STRIDE * (setStarts[k] as number));
  });
  return { sets, rows, setStarts };
}

/**
 * Flux density (T) at many points (x, y, z a point, m) for 1 A in every set: x, y, z of set k at point p at
 * `out[(k · points + p) · 3]`, to the bits of `addField`; what stood there is overwritten.
 */
export function fillSetsField(
  { sets, rows, setStarts }: PackedSets,
  points: Float64Array,
  out: Float64Array,
): void {
  fillInfluence(rows, setStarts, points, out);
  sets.forEach((set, k) => {
    if (set.rows) return;
    for (let p = 0; p < points.length; p += 3) {
      const [x, y, z] = [points[p] as number, points[p + 1] as number, points[p + 2] as number];
      set.addField(x, y, z, out, k * points.length + p);
    }
  });
}
