import type { Vector } from "~/field/vector";
import { product } from "../measures/measure";
import type { CircuitItem } from "../source-item";
import type { CompiledPlan } from "../compile";
import { RECTANGULAR } from "./families";

/**
 * Unstated stray current of one circuit at one sensor: the field of a net current on its centre line with one standard
 * uncertainty (load factor 1), and the component whose frequency it has.
 */
export interface StrayInput {
  item: number;
  component: number;
  group: number;
  /** Nine numbers for gradients, three for fields; T or T/m. */
  perUncertainty: Float64Array;
  /** Length of `perUncertainty`. */
  norm: number;
}

export function strayInputs(plan: CompiledPlan, position: Vector, width: 3 | 9): StrayInput[] {
  return plan.components.flatMap(({ item, group, drive }, component) => {
    const source = plan.items[item];
    if (source?.kind !== "circuit" || drive.order > 1 || !source.centreLine) return [];
    const boundA = source.circuit.strayToleranceA * source.shieldingFactor;
    if (boundA === 0) return [];
    const perUncertainty = centreLineField(source, position, width, boundA);
    return [{ item, component, group, perUncertainty, norm: Math.hypot(...perUncertainty) }];
  });
}

function centreLineField(
  source: CircuitItem,
  [x, y, z]: readonly [number, number, number],
  width: 3 | 9,
  boundA: number,
): Float64Array {
  const out = new Float64Array(width);
  if (width === 3) source.centreLine?.addField(x, y, z, out, 0);
  else source.centreLine?.addGradient(x, y, z, out, 0);
  return out.map((value) => value * boundA * RECTANGULAR);
}

/** Change of the value by one standard uncertainty of a stray current in the phase that hurts most. */
export function strayEffect({ group, perUncertainty }: StrayInput, slope: Float64Array): number {
  const { re, im } = strayProjection(group, perUncertainty, slope);
  return Math.hypot(re, im);
}

/** Phasor that turns a stray current into the phase that hurts most, as (cos φ, sin φ); in phase where nothing tells. */
export function worstPhase({ group, perUncertainty }: StrayInput, slope: Float64Array): [number, number] {
  const { re, im } = strayProjection(group, perUncertainty, slope);
  const size = Math.hypot(re, im);
  return size > 0 ? [re / size, im / size] : [1, 0];
}

function strayProjection(group: number, perUncertainty: Float64Array, slope: Float64Array) {
  const width = perUncertainty.length;
  return {
    re: product(perUncertainty, 0, slope, 2 * width * group, width),
    // DC has no imaginary part: its slope there is nought.
    im: product(perUncertainty, 0, slope, 2 * width * group + width, width),
  };
}
