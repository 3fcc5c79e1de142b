import { SEGMENT_STRIDE } from "~/field/segment";
import { seededRandom } from "./measure";

export interface KernelInput {
  rows: Float64Array;
  setStarts: Int32Array;
  currentsReIm: Float64Array;
  points: Float64Array;
}

const SETS = 200;
const SEGMENTS_PER_SET = 10;
export const SEGMENTS = SETS * SEGMENTS_PER_SET;
export const POINTS = 20_000;
const CONDUCTOR_RADIUS_M = 0.006;

/** Routes of legs along and up a hall of 60 m × 40 m × 4 m, and points all over it. */
export function kernelInput(): KernelInput {
  const random = seededRandom(2024);
  const rows = new Float64Array(SEGMENTS * SEGMENT_STRIDE);
  const setStarts = Int32Array.from({ length: SETS + 1 }, (_, set) => set * SEGMENTS_PER_SET);
  for (let set = 0; set < SETS; set++) {
    let from = [60 * random(), 40 * random(), 4 * random()];
    for (let leg = 0; leg < SEGMENTS_PER_SET; leg++) {
      const axis = leg % 3;
      const reachM = axis === 2 ? 4 : 20;
      const to = from.map((value, i) => (i === axis ? value + (random() - 0.5) * reachM : value));
      rows.set([...from, ...to, CONDUCTOR_RADIUS_M, 1], (set * SEGMENTS_PER_SET + leg) * SEGMENT_STRIDE);
      from = to;
    }
  }
  const currentsReIm = Float64Array.from({ length: 2 * SETS }, () => 400 * (random() - 0.5));
  const points = new Float64Array(3 * POINTS);
  for (let point = 0; point < POINTS; point++)
    points.set([60 * random(), 40 * random(), 4 * random()], 3 * point);
  return { rows, setStarts, currentsReIm, points };
}
