import type { Vector } from "~/field/vector";
import { ellipseAt } from "./ellipse";
import { product } from "./measure";

/** Magnitude of one phase-locked group with its derivative and its projection. */
export interface GroupMagnitude {
  value: number;
  /** Linear form: δ changes the magnitude by ⟨slope, δ⟩. */
  slope: Float64Array;
  /** The group's phasor projected on what is compared, divided by its squared length: ⟨share, B⟩ = 1. */
  share: Float64Array;
}

export type MagnitudeOf = (groups: Float64Array, at: number) => GroupMagnitude;

/** Root-mean-square resultant √ΣB_i² (IEC 61786-1). */
export const resultant: MagnitudeOf = (groups, at) => {
  const value = Math.sqrt(product(groups, at, groups, at, 6));
  return { value, ...along(groups.subarray(at, at + 6), value) };
};

/** Rms component along a unit axis. */
export function axisComponent(axis: Vector): MagnitudeOf {
  return (groups, at) => {
    const re = product(groups, at, axis, 0, 3);
    const im = product(groups, at + 3, axis, 0, 3);
    const value = Math.hypot(re, im);
    const projected = Float64Array.from([...axis.map((n) => n * re), ...axis.map((n) => n * im)]);
    return { value, ...along(projected, value) };
  };
}

/** Semi-major axis of the ellipse, in rms terms; shares are those of the resultant. */
export const majorAxis: MagnitudeOf = (groups, at) => {
  const { major, axis, phaseRad } = ellipseAt(groups, at);
  const slope = Float64Array.from([
    ...axis.map((n) => n * Math.cos(phaseRad)),
    ...axis.map((n) => n * Math.sin(phaseRad)),
  ]);
  return { value: major, slope, share: resultant(groups, at).share };
};

function along(projected: Float64Array, value: number): { slope: Float64Array; share: Float64Array } {
  const divide = (by: number) => (by > 0 ? projected.map((part) => part / by) : new Float64Array(6));
  return { slope: divide(value), share: divide(value * value) };
}
