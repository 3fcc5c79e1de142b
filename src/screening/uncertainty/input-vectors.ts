import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import type { FamilyKind } from "./families";
import { worstPhase, type StrayInput } from "./stray";

/** One uncertain input in one load case: the change of all groups by one standard uncertainty. */
export interface InputVector {
  groups: Float64Array;
  kind: FamilyKind | "stray";
  /** The family's key, or the item for stray currents. */
  key: number;
}

/** Every input that moves the included components; `without` leaves items out. Stray currents flow in the phase that `slope` gives. */
export function inputVectors(
  judging: LimitJudging,
  factors: CaseFactors,
  slope: Float64Array | null = null,
  without: ReadonlySet<number> = new Set(),
): InputVector[] {
  const { at, included, measure, stride } = judging;
  const size = stride * at.plan.frequencies.groups.length;
  const vectors = at.familiesFor(measure.width).flatMap((family) => {
    const byKey = Array.from({ length: family.keyCount }, () => new Float64Array(size));
    at.plan.components.forEach(({ item, group }, component) => {
      const key = family.keys[component] as number;
      if (key < 0 || !included[component] || (without.has(item) && family.kind !== "spacing")) return;
      const into = byKey[key];
      if (into)
        addScaled(
          into,
          stride * group,
          family.vectors,
          stride * component,
          stride,
          factors.items[item] as number,
        );
    });
    return byKey.map((groups, key): InputVector => ({ groups, kind: family.kind, key }));
  });
  const strays = at.straysFor(measure.width).flatMap((stray): InputVector[] => {
    if (!included[stray.component]) return [];
    const groups = strayVector(
      stray,
      size,
      factors.items[stray.item] as number,
      slope ?? new Float64Array(size),
    );
    return [{ groups, kind: "stray", key: stray.item }];
  });
  return [...vectors, ...strays];
}

function strayVector(stray: StrayInput, size: number, factor: number, slope: Float64Array): Float64Array {
  const groups = new Float64Array(size);
  const [cos, sin] = worstPhase(stray, slope);
  const width = stray.perUncertainty.length;
  addScaled(groups, 2 * width * stray.group, stray.perUncertainty, 0, width, factor * cos);
  addScaled(groups, 2 * width * stray.group + width, stray.perUncertainty, 0, width, factor * sin);
  return groups;
}

function addScaled(
  into: Float64Array,
  at: number,
  from: Float64Array,
  start: number,
  count: number,
  factor: number,
): void {
  for (let i = 0; i < count; i++) {
    into[at + i] = (into[at + i] as number) + factor * (from[start + i] as number);
  }
}
