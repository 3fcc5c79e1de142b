import { addSegmentField } from "../segment";
import { INFLUENCE_STRIDE, PHASOR_STRIDE, POINT_STRIDE, type SegmentKernel } from "./segment-kernel";

/** The kernel in plain TypeScript, for where WebAssembly SIMD is not to be had. */
export const scalarKernel: SegmentKernel = {
  name: "scalar",

  fillInfluence(rows, setStarts, points, out) {
    const pointCount = points.length / POINT_STRIDE;
    const setCount = setStarts.length - 1;
    out.fill(0, 0, setCount * pointCount * INFLUENCE_STRIDE);
    for (let set = 0; set < setCount; set++) {
      const first = setStarts[set] as number;
      const last = setStarts[set + 1] as number;
      for (let point = 0; point < pointCount; point++) {
        const p = point * POINT_STRIDE;
        const at = (set * pointCount + point) * INFLUENCE_STRIDE;
        const x = points[p] as number;
        addSegmentField(rows, first, last, x, points[p + 1] as number, points[p + 2] as number, out, at);
      }
    }
  },

  fillPhasorField(rows, setStarts, currentsReIm, points, out) {
    const pointCount = points.length / POINT_STRIDE;
    const setCount = setStarts.length - 1;
    const influence = new Float64Array(3);
    out.fill(0, 0, pointCount * PHASOR_STRIDE);
    for (let point = 0; point < pointCount; point++) {
      const p = point * POINT_STRIDE;
      const x = points[p] as number;
      const y = points[p + 1] as number;
      const z = points[p + 2] as number;
      for (let set = 0; set < setCount; set++) {
        influence.fill(0);
        addSegmentField(rows, setStarts[set] as number, setStarts[set + 1] as number, x, y, z, influence, 0);
        const re = currentsReIm[2 * set] as number;
        const im = currentsReIm[2 * set + 1] as number;
        for (let axis = 0; axis < 3; axis++) {
          const at = point * PHASOR_STRIDE + 2 * axis;
          const fieldT = influence[axis] as number;
          out[at] = (out[at] as number) + re * fieldT;
          out[at + 1] = (out[at + 1] as number) + im * fieldT;
        }
      }
    }
  },
};
