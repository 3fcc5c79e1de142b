import { SEGMENT_STRIDE, type SegmentRows } from "../segment";
import { scalarKernel } from "./scalar-kernel";
import { INFLUENCE_STRIDE, PHASOR_STRIDE, POINT_STRIDE, type SegmentKernel } from "./segment-kernel";
import { createSimdKernel } from "./simd-kernel";

let kernel: SegmentKernel | undefined;

/** The kernel of this thread: WebAssembly SIMD where it can be had, otherwise plain TypeScript, to the same bits. */
export function segmentKernel(): SegmentKernel {
  kernel ??= createSimdKernel() ?? scalarKernel;
  return kernel;
}

/**
 * Fills `out` with the influence block: the flux density (T) at every point for 1 A in every set, in the frame of the
 * rows. Formula and inside of conductors: see addSegmentField; a set's rows are summed in their order.
 *
 * - `rows`: packed segments (see SegmentRows). Rows of one polyline in order, each starting exactly where the one before
 *   ends, are the fastest.
 * - `setStarts`: set k is the rows `setStarts[k]` ≤ row < `setStarts[k + 1]`; one entry more than sets. A set may be empty.
 * - `points`: x, y, z (m) a point.
 * - `out`: x, y, z of set k at point p at `out[(k · points + p) · 3]`; what stood there is overwritten.
 *
 * Each figure depends on its set and its point alone, to the bit, not on what else is asked in the same call.
 * Throws a RangeError when a length does not fit.
 */
export function fillInfluence(
  rows: SegmentRows,
  setStarts: ArrayLike<number>,
  points: Float64Array,
  out: Float64Array,
): void {
  const pointCount = checkedPointCount(points);
  const setCount = checkedSetCount(rows, setStarts);
  checkLength("out", out, setCount * pointCount * INFLUENCE_STRIDE);
  segmentKernel().fillInfluence(rows, setStarts, points, out);
}

/**
 * Fills `out` with the complex flux density (T) at every point, summed over the sets in order.
 *
 * - `rows`, `setStarts`, `points`: as for fillInfluence.
 * - `currentsReIm`: re, im of the current (A) a set.
 * - `out`: re x, im x, re y, im y, re z, im z of point p at `out[6p]`; what stood there is overwritten.
 *
 * Each figure depends on the sets and its point alone, to the bit, so a map may be cut into calls anywhere.
 * Throws a RangeError when a length does not fit.
 */
export function fillPhasorField(
  rows: SegmentRows,
  setStarts: ArrayLike<number>,
  currentsReIm: Float64Array,
  points: Float64Array,
  out: Float64Array,
): void {
  const pointCount = checkedPointCount(points);
  const setCount = checkedSetCount(rows, setStarts);
  checkLength("currentsReIm", currentsReIm, 2 * setCount);
  checkLength("out", out, pointCount * PHASOR_STRIDE);
  segmentKernel().fillPhasorField(rows, setStarts, currentsReIm, points, out);
}

function checkedPointCount(points: Float64Array): number {
  const count = points.length / POINT_STRIDE;
  if (!Number.isInteger(count)) {
    throw new RangeError(`points holds ${points.length} numbers; it needs x, y and z of each point.`);
  }
  return count;
}

function checkedSetCount(rows: SegmentRows, setStarts: ArrayLike<number>): number {
  const rowCount = rows.length / SEGMENT_STRIDE;
  let last = 0;
  for (let i = 0; i < setStarts.length; i++) {
    const start = setStarts[i] as number;
    if (!(start >= last && start <= rowCount)) {
      throw new RangeError(
        `setStarts[${i}] is ${start}; it must lie from ${last} to the ${rowCount} rows given.`,
      );
    }
    last = start;
  }
  if (setStarts.length === 0)
    throw new RangeError("setStarts is empty; it needs one entry more than there are sets.");
  return setStarts.length - 1;
}

function checkLength(name: string, array: Float64Array, needed: number): void {
  if (array.length < needed) {
    throw new RangeError(`${name} holds ${array.length} numbers; ${needed} are needed.`);
  }
}
