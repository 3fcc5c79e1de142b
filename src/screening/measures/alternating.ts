import type { Vector } from "~/field/vector";
import type { FieldGroup } from "../frequency-classes";
import {
  axisComponent,
  majorAxis,
  resultant,
  type GroupMagnitude,
  type MagnitudeOf,
} from "./group-magnitude";
import { ellipseAt } from "./ellipse";
import { blankMeasured, product, type Measure, type Measured, type MeasuredState } from "./measure";

export type UnknownPhase = "worst-case" | "typical";

/** Magnitude at one frequency class, sources combined and bounds added, with its derivative by each group's magnitude. */
export interface ClassMagnitude {
  value: number;
  groups: { group: number; magnitude: GroupMagnitude; weight: number }[];
}

/**
 * Alternating field over the groups of the state: magnitude per source, sources of one frequency added (worst-case) or
 * root-sum-squared (typical), bounds added, then root-sum-squared over frequencies; `peakToPeak` is 2√2 times the sum
 * over frequencies of the major axes (or axis components).
 */
export function alternatingMeasure(
  groups: readonly FieldGroup[],
  axis: Vector | null,
  unknownPhase: UnknownPhase,
  measure: "rms" | "peakToPeak",
): Measure {
  const magnitudeOf = axis ? axisComponent(axis) : measure === "peakToPeak" ? majorAxis : resultant;
  return (state) => {
    const classes = classMagnitudes(state, groups, magnitudeOf, unknownPhase);
    const squares = classes.reduce((sum, { value }) => sum + value * value, 0);
    const rss = Math.sqrt(squares);
    const measured = blankMeasured(state);
    if (measure === "rms") measured.value = rss;
    else measured.value = 2 * Math.SQRT2 * classes.reduce((sum, { value }) => sum + value, 0);
    classes.forEach((entry, classIndex) => {
      const byClass = measure === "rms" ? (rss > 0 ? entry.value / rss : 0) : 2 * Math.SQRT2;
      const shareOfClass = squares > 0 ? entry.value / squares : 0;
      addSlopes(measured, entry, byClass, shareOfClass);
      if (classIndex === 0) return;
      // Where nothing flows a bound is the whole of its frequency: the slope is that of a magnitude.
      measured.boundSlope[classIndex] = measure === "rms" && rss === 0 ? 1 : byClass;
      measured.boundShare[classIndex] = shareOfClass;
    });
    return measured;
  };
}

/** The value of `alternatingMeasure` alone. */
export function alternatingValue(
  groups: readonly FieldGroup[],
  axis: Vector | null,
  unknownPhase: UnknownPhase,
  measure: "rms" | "peakToPeak",
): (state: MeasuredState) => number {
  const size = axis
    ? axisSize(axis)
    : (field: Float64Array, at: number) =>
        measure === "peakToPeak" ? ellipseAt(field, at).major : Math.sqrt(product(field, at, field, at, 6));
  const worst = unknownPhase === "worst-case";
  let sums = new Float64Array(0);
  return (state) => {
    if (sums.length !== state.bounds.length) sums = new Float64Array(state.bounds.length);
    sums.fill(0);
    groups.forEach(({ classIndex }, group) => {
      if (classIndex === 0) return;
      const magnitude = size(state.groups, 6 * group);
      sums[classIndex] = (sums[classIndex] as number) + (worst ? magnitude : magnitude * magnitude);
    });
    let total = 0;
    for (let classIndex = 1; classIndex < sums.length; classIndex++) {
      const sum = sums[classIndex] as number;
      const value = (worst ? sum : Math.sqrt(sum)) + (state.bounds[classIndex] as number);
      total += measure === "rms" ? value * value : value;
    }
    return measure === "rms" ? Math.sqrt(total) : 2 * Math.SQRT2 * total;
  };
}

const axisSize = (axis: Vector) => (field: Float64Array, at: number) =>
  Math.hypot(product(field, at, axis, 0, 3), product(field, at + 3, axis, 0, 3));

/** Magnitudes of all classes, DC left at nought. */
export function classMagnitudes(
  state: MeasuredState,
  groups: readonly FieldGroup[],
  magnitudeOf: MagnitudeOf,
  unknownPhase: UnknownPhase,
): ClassMagnitude[] {
  const classes = Array.from(state.bounds, (): ClassMagnitude => ({ value: 0, groups: [] }));
  groups.forEach(({ classIndex }, group) => {
    if (classIndex === 0) return;
    const magnitude = magnitudeOf(state.groups, 6 * group);
    if (magnitude.value > 0) classes[classIndex]?.groups.push({ group, magnitude, weight: 1 });
  });
  classes.forEach((entry, classIndex) => {
    if (classIndex === 0) return;
    entry.value = combine(entry, unknownPhase) + (state.bounds[classIndex] as number);
  });
  return classes;
}

function combine(entry: ClassMagnitude, unknownPhase: UnknownPhase): number {
  if (unknownPhase === "worst-case")
    return entry.groups.reduce((sum, { magnitude }) => sum + magnitude.value, 0);
  const rss = Math.sqrt(entry.groups.reduce((sum, { magnitude }) => sum + magnitude.value ** 2, 0));
  for (const part of entry.groups) part.weight = part.magnitude.value / rss;
  return rss;
}

/** Adds a class's part to the slopes (times `byClass`) and shares (times `shareOfClass`). */
export function addSlopes(
  measured: Measured,
  entry: ClassMagnitude,
  byClass: number,
  shareOfClass: number,
): void {
  for (const { group, magnitude, weight } of entry.groups) {
    for (let i = 0; i < 6; i++) {
      measured.slope[6 * group + i] = byClass * weight * (magnitude.slope[i] as number);
      measured.share[6 * group + i] =
        shareOfClass * weight * magnitude.value * (magnitude.share[i] as number);
    }
  }
}
