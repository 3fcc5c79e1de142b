import type { Component } from "../compile";

/** What a family's inputs are: currents, spacings, circuits' places along u and v, the sensor's place on x, y and z. */
export type FamilyKind = "current" | "spacing" | "u" | "v" | "x" | "y" | "z";

export const SENSOR_AXES = ["x", "y", "z"] as const;

/**
 * Inputs of one kind that are uncertain, by the components they move. `vectors` holds per component (stride numbers, load
 * factor 1) the change of its phasors by one standard uncertainty; components with the same key move together; −1: none.
 */
export interface InputFamily {
  vectors: Float64Array;
  stride: 6 | 18;
  keys: Int32Array;
  keyCount: number;
  kind: FamilyKind;
}

/** Rectangular distribution of half-width a: u = a/√3 (JCGM 100, 4.3.7). */
export const RECTANGULAR = 1 / Math.sqrt(3);

/** Numbers the distinct keys of components in their order; null: not uncertain. */
export function keyed(
  components: readonly Component[],
  keyOf: (component: Component) => string | null,
): { keys: Int32Array; keyCount: number } {
  const numbers = new Map<string, number>();
  const keys = Int32Array.from(components, (component) => {
    const key = keyOf(component);
    if (key === null) return -1;
    const known = numbers.get(key);
    if (known !== undefined) return known;
    numbers.set(key, numbers.size);
    return numbers.size - 1;
  });
  return { keys, keyCount: numbers.size };
}

/** Changes of the measured value by one standard uncertainty of each key: Σ over its components of factor · ⟨slope, vector⟩. */
export function effectsOf(
  family: InputFamily,
  components: readonly Component[],
  factors: Float64Array,
  included: readonly boolean[],
  slope: Float64Array,
): Float64Array {
  const effects = new Float64Array(family.keyCount);
  const { vectors, stride, keys } = family;
  components.forEach(({ item, group }, index) => {
    const key = keys[index] as number;
    if (key < 0 || !included[index]) return;
    let sum = 0;
    for (let i = 0; i < stride; i++) {
      sum += (vectors[stride * index + i] as number) * (slope[stride * group + i] as number);
    }
    effects[key] = (effects[key] as number) + (factors[item] as number) * sum;
  });
  return effects;
}

/** Upper bounds of the length of each key's change: Σ over its components of |factor| · |vector|. */
export function effectNorms(
  family: InputFamily,
  components: readonly Component[],
  factors: Float64Array,
  included: readonly boolean[],
): Float64Array {
  const norms = new Float64Array(family.keyCount);
  const lengths = vectorLengths(family);
  components.forEach(({ item }, index) => {
    const key = family.keys[index] as number;
    if (key < 0 || !included[index]) return;
    norms[key] = (norms[key] as number) + Math.abs(factors[item] as number) * (lengths[index] as number);
  });
  return norms;
}

const knownLengths = new WeakMap<InputFamily, Float64Array>();

function vectorLengths(family: InputFamily): Float64Array {
  const known = knownLengths.get(family);
  if (known) return known;
  const { vectors, stride, keys } = family;
  const lengths = Float64Array.from(keys, (_, index) => {
    let sum = 0;
    for (let i = stride * index; i < stride * (index + 1); i++) sum += (vectors[i] as number) ** 2;
    return Math.sqrt(sum);
  });
  knownLengths.set(family, lengths);
  return lengths;
}
