import type { Vector } from "~/field/vector";
import type { CompiledPlan } from "./compile";
import { componentPhasors, gradientAt, influenceAt } from "./influence";

/**
 * What every component gives at one point at load factor 1: six numbers a component (real x, y, z, imaginary x, y, z; T, rms),
 * and its gradient (18 numbers: nine real, nine imaginary; T/m) once asked for.
 */
export class SensorField {
  readonly phasors: Float64Array;
  private gradientPhasors: Float64Array | null = null;
  private scalingPhasors: Float64Array | null = null;
  private readonly influence: Float64Array;

  constructor(
    readonly plan: CompiledPlan,
    readonly position: Vector,
  ) {
    this.influence = new Float64Array(3 * plan.setCount);
    influenceAt(plan, ...position, this.influence);
    this.phasors = new Float64Array(6 * plan.components.length);
    componentPhasors(plan, this.influence, 3, "currents", this.phasors);
  }

  /** The part that follows the supplies' currents and their tolerances. */
  get scaling(): Float64Array {
    if (!this.scalingPhasors) {
      this.scalingPhasors = new Float64Array(this.phasors.length);
      componentPhasors(this.plan, this.influence, 3, "scaling", this.scalingPhasors);
    }
    return this.scalingPhasors;
  }

  get gradients(): Float64Array {
    this.gradientPhasors ??= gradientPhasorsAt(this.plan, this.position, "currents");
    return this.gradientPhasors;
  }
}

/** Gradient phasors of every component at a point, as `SensorField.gradients`. */
export function gradientPhasorsAt(
  plan: CompiledPlan,
  position: Vector,
  which: "currents" | "scaling",
): Float64Array {
  const jacobians = new Float64Array(9 * plan.setCount);
  gradientAt(plan, ...position, jacobians);
  const out = new Float64Array(18 * plan.components.length);
  componentPhasors(plan, jacobians, 9, which, out);
  return out;
}

/**
 * Sums the included components into their groups: `out[stride·group + i] += factor · phasors[stride·c + i]`, stride 6 for fields,
 * 18 for gradients. Components are taken in the document's order, so that equal documents give equal bytes.
 */
export function sumGroups(
  plan: CompiledPlan,
  phasors: Float64Array,
  stride: 6 | 18,
  factors: Float64Array,
  included: readonly boolean[],
  out: Float64Array,
): void {
  out.fill(0);
  plan.components.forEach(({ item, group }, index) => {
    if (!included[index]) return;
    const factor = factors[item] as number;
    const from = stride * index;
    const to = stride * group;
    for (let i = 0; i < stride; i++) {
      out[to + i] = (out[to + i] as number) + factor * (phasors[from + i] as number);
    }
  });
}
