import type { Vector } from "~/field/vector";
import { blankMeasured, product, type Measure, type MeasuredState } from "./measure";

/**
 * Magnitude of the DC group: resultant (axis null) or the component along a unit axis, plus the bounds at DC.
 * Serves static and swing (width 3) and gradient (width 9: the Frobenius norm; axis null).
 */
export function dcMagnitude(width: 3 | 9, axis: Vector | null): Measure {
  return (state) => {
    const measured = blankMeasured(state);
    const { slope, share } = measured;
    for (let i = 0; i < width; i++) slope[i] = state.groups[i] as number;
    if (axis) {
      const component = product(state.groups, 0, axis, 0, 3);
      for (let i = 0; i < 3; i++) slope[i] = component * (axis[i] as number);
    }
    const magnitude = Math.sqrt(product(slope, 0, slope, 0, width));
    const value = magnitude + (state.bounds[0] ?? 0);
    measured.value = value;
    measured.boundSlope[0] = 1;
    for (let i = 0; i < width; i++) {
      const part = magnitude > 0 ? (slope[i] as number) / magnitude : 0;
      slope[i] = part;
      share[i] = value > 0 ? part / value : 0;
    }
    measured.boundShare[0] = value > 0 ? 1 / value : 0;
    return measured;
  };
}

/** The value of `dcMagnitude` alone. */
export function dcMagnitudeValue(width: 3 | 9, axis: Vector | null): (state: MeasuredState) => number {
  return ({ groups, bounds }) => {
    const magnitude = axis
      ? Math.abs(product(groups, 0, axis, 0, 3))
      : Math.sqrt(product(groups, 0, groups, 0, width));
    return magnitude + (bounds[0] ?? 0);
  };
}
