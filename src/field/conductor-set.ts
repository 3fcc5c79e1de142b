import { addSegmentField, type SegmentRows } from "./segment";
import { addSegmentGradient } from "./segment-gradient";

/**
 * Conductors that carry one current between them: the column of the influence matrix.
 * Both methods add what 1 A in the set gives at (x, y, z) (m): the flux density (T) to `out[at..at+2]`,
 * the gradient ∂B_i/∂x_j (T/m) to `out[at + 3i + j]`.
 */
export interface ConductorSet {
  addField(x: number, y: number, z: number, out: Float64Array, at: number): void;
  addGradient(x: number, y: number, z: number, out: Float64Array, at: number): void;
}

/** The rows `first` ≤ row < `last` as one set. */
export function segmentSet(rows: SegmentRows, first: number, last: number): ConductorSet {
  return {
    addField: (x, y, z, out, at) => addSegmentField(rows, first, last, x, y, z, out, at),
    addGradient: (x, y, z, out, at) => addSegmentGradient(rows, first, last, x, y, z, out, at),
  };
}
