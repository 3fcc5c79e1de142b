import type { SegmentRows } from "../segment";

/**
 * Fills the caller's arrays with the field of sets of straight segments; see fill-field.ts for shapes and units.
 * Every implementation gives the same bits: the same operations in the same order.
 */
export interface SegmentKernel {
  readonly name: "simd" | "scalar";
  fillInfluence(
    rows: SegmentRows,
    setStarts: ArrayLike<number>,
    points: Float64Array,
    out: Float64Array,
  ): void;
  fillPhasorField(
    rows: SegmentRows,
    setStarts: ArrayLike<number>,
    currentsReIm: Float64Array,
    points: Float64Array,
    out: Float64Array,
  ): void;
}

/** Numbers a point: x, y, z in m. */
export const POINT_STRIDE = 3;
/** Numbers a set and point in an influence block: x, y, z in T for 1 A. */
export const INFLUENCE_STRIDE = 3;
/** Numbers a point in a phasor field: re x, im x, re y, im y, re z, im z in T. */
export const PHASOR_STRIDE = 6;
