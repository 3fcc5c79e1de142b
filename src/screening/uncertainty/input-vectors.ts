import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import { effectNorms, type FamilyKind, type InputFamily } from "./families";
import { worstPhase, type StrayInput } from "./stray";

/** One uncertain input in one load case: the change of the groups that it moves by one standard uncertainty. */
export interface InputVector {
  kind: FamilyKind | "stray";
  /** The family's key, or the item for stray currents. */
  key: number;
  /** Groups moved, and `stride` numbers for each of them in `values`. */
  groups: number[];
  values: Float64Array;
}

/** Every input that moves the included components; `without` leaves items out. Stray currents flow in the phase that `slope` gives. */
export function inputVectors(
  judging: LimitJudging,
  factors: CaseFactors,
  slope: Float64Array,
  without: ReadonlySet<number> = new Set(),
): InputVector[] {
  const { at, included, measure } = judging;
  const families = at
    .familiesFor(measure.width)
    .flatMap((family) => familyVectors(judging, factors, family, without));
  const strays = at.straysFor(measure.width).flatMap((stray): InputVector[] => {
    if (!included[stray.component]) return [];
    const values = strayVector(stray, factors.items[stray.item] as number, slope);
    return [{ kind: "stray", key: stray.item, groups: [stray.group], values }];
  });
  return [...families, ...strays];
}

/** An upper bound of the trace of the covariance, had without forming any vector. */
export function traceBound(judging: LimitJudging, factors: CaseFactors): number {
  const { at, included, measure } = judging;
  let trace = 0;
  for (const family of at.familiesFor(measure.width)) {
    for (const norm of effectNorms(family, at.plan.components, factors.items, included)) trace += norm * norm;
  }
  for (const { component, item, norm } of at.straysFor(measure.width)) {
    if (included[component]) trace += ((factors.items[item] as number) * norm) ** 2;
  }
  return trace;
}

function familyVectors(
  { at, included, stride }: LimitJudging,
  factors: CaseFactors,
  family: InputFamily,
  without: ReadonlySet<number>,
): InputVector[] {
  const byKey = Array.from({ length: family.keyCount }, () => new Map<number, Float64Array>());
  at.plan.components.forEach(({ item, group }, component) => {
    const key = family.keys[component] as number;
    if (key < 0 || !included[component] || (without.has(item) && family.kind !== "spacing")) return;
    const moved = byKey[key];
    if (!moved) return;
    let into = moved.get(group);
    if (!into) moved.set(group, (into = new Float64Array(stride)));
    const factor = factors.items[item] as number;
    for (let i = 0; i < stride; i++) {
      into[i] = (into[i] as number) + factor * (family.vectors[stride * component + i] as number);
    }
  });
  return byKey.map((moved, key): InputVector => {
    const values = new Float64Array(stride * moved.size);
    [...moved.values()].forEach((block, i) => values.set(block, stride * i));
    return { kind: family.kind, key, groups: [...moved.keys()], values };
  });
}

function strayVector(stray: StrayInput, factor: number, slope: Float64Array): Float64Array {
  const [cos, sin] = worstPhase(stray, slope);
  const width = stray.perUncertainty.length;
  const values = new Float64Array(2 * width);
  stray.perUncertainty.forEach((value, i) => {
    values[i] = factor * cos * value;
    values[width + i] = factor * sin * value;
  });
  return values;
}
