import { packSets, type PackedSets } from "~/field/conductor-set";
import type { CompiledPlan } from "./compile";

const packed = new WeakMap<CompiledPlan, PackedSets>();

/** All conductor sets of a plan as the kernel takes them; packed once a plan. */
export function planRows(plan: CompiledPlan): PackedSets {
  let known = packed.get(plan);
  if (!known) {
    known = packSets(plan.items.flatMap(({ sets }) => sets));
    packed.set(plan, known);
  }
  return known;
}

/**
 * Field at a point for 1 A in every conductor set: `fieldT[3k..3k+2]`, T/A, plan axes.
 * Fills `out`, which holds 3·setCount numbers.
 */
export function influenceAt(plan: CompiledPlan, x: number, y: number, z: number, out: Float64Array): void {
  out.fill(0);
  let at = 0;
  for (const item of plan.items) {
    for (const set of item.sets) {
      set.addField(x, y, z, out, at);
      at += 3;
    }
  }
}

/** Gradient at a point for 1 A in every conductor set: `out[9k + 3i + j]` = ∂B_i/∂x_j, T/(m·A). */
export function gradientAt(plan: CompiledPlan, x: number, y: number, z: number, out: Float64Array): void {
  out.fill(0);
  let at = 0;
  for (const item of plan.items) {
    for (const set of item.sets) {
      set.addGradient(x, y, z, out, at);
      at += 9;
    }
  }
}

export type CurrentsOf = "currents" | "scaling";

/**
 * Phasors of every component at load factor 1 from an influence matrix of `width` numbers a set (3: field, 9: gradient):
 * `out[2·width·c + i]` the real, `out[2·width·c + width + i]` the imaginary part, shielding included.
 */
export function componentPhasors(
  plan: CompiledPlan,
  influence: Float64Array,
  width: 3 | 9,
  which: CurrentsOf,
  out: Float64Array,
): void {
  out.fill(0);
  plan.components.forEach(({ item, firstSet, drive }, index) => {
    const source = plan.items[item];
    if (!source) return;
    const base = 2 * width * index;
    const currents = drive[which];
    for (let set = 0; set < source.sets.length; set++) {
      const re = (currents[2 * set] as number) * source.shieldingFactor;
      const im = (currents[2 * set + 1] as number) * source.shieldingFactor;
      const at = width * (firstSet + set);
      for (let i = 0; i < width; i++) {
        const g = influence[at + i] as number;
        out[base + i] = (out[base + i] as number) + re * g;
        out[base + width + i] = (out[base + width + i] as number) + im * g;
      }
    }
  });
}
