import type { FieldGroup } from "../frequency-classes";
import { addSlopes, classMagnitudes } from "./alternating";
import { majorAxis } from "./group-magnitude";
import { blankMeasured, type Measure } from "./measure";

/**
 * Upper bound of the instantaneous field: |B_earth + B_dc| + √2 × the sum over sources and frequencies of the major axes,
 * bounds added (those at a frequency times √2). It has no shares. Throws without an Earth field.
 */
export function rangeMeasure(groups: readonly FieldGroup[]): Measure {
  return (state) => {
    const { earth } = state;
    if (!earth) throw new Error("a range is judged with the Earth's field, and none was given");
    const measured = blankMeasured(state);
    const steady = earth.fieldT.map((component, i) => component + (state.groups[i] as number));
    const magnitude = Math.hypot(...steady);
    measured.value = magnitude + (state.bounds[0] ?? 0);
    steady.forEach((component, i) => (measured.slope[i] = magnitude > 0 ? component / magnitude : 0));
    measured.boundSlope[0] = 1;
    classMagnitudes(state, groups, majorAxis, "worst-case").forEach((entry, classIndex) => {
      if (classIndex === 0) return;
      measured.value += Math.SQRT2 * entry.value;
      addSlopes(measured, entry, Math.SQRT2, 0);
      measured.boundSlope[classIndex] = Math.SQRT2;
    });
    return measured;
  };
}
