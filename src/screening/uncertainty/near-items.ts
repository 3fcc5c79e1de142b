import type { Vector } from "~/field/vector";
import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import type { SourceItem } from "../source-item";
import { RECTANGULAR } from "./families";
import { frameOf } from "./sensor-families";

/** A unit-variance draw of the input of a family's key; 0 where a family has no such input. */
export type DrawOf = (kind: "current" | "u" | "v" | "x" | "y" | "z", key: number) => number;

/** Adds the field of items close to the sensor, computed anew where a draw puts them, to the groups. */
export class NearItems {
  private readonly perItem: {
    item: SourceItem;
    index: number;
    along: { u: Vector; v: Vector } | null;
    components: number[];
    influence: Float64Array;
  }[];

  constructor(
    private readonly judging: LimitJudging,
    indices: readonly number[],
  ) {
    const { plan, sensor } = judging.at;
    this.perItem = indices.flatMap((index) => {
      const item = plan.items[index];
      if (!item) return [];
      const components = plan.components.flatMap((component, c) =>
        component.item === index && judging.included[c] ? [c] : [],
      );
      const influence = new Float64Array(judging.measure.width * item.sets.length);
      return [{ item, index, along: frameOf(plan, item, sensor.position), components, influence }];
    });
  }

  addTo(groups: Float64Array, factors: CaseFactors, draw: DrawOf): void {
    const { width } = this.judging.measure;
    for (const { item, index, along, components, influence } of this.perItem) {
      const [first] = components;
      if (first === undefined) continue;
      const [x, y, z] = this.displaced(item, along, first, draw);
      influence.fill(0);
      item.sets.forEach((set, k) => {
        if (width === 3) set.addField(x, y, z, influence, 3 * k);
        else set.addGradient(x, y, z, influence, 9 * k);
      });
      const scale = (factors.items[index] as number) * item.shieldingFactor;
      for (const component of components) this.addComponent(groups, component, influence, scale, draw);
    }
  }

  /** Where the sensor stands as seen from the item: it moves itself, and the item moves the other way. */
  private displaced(
    item: SourceItem,
    along: { u: Vector; v: Vector } | null,
    component: number,
    draw: DrawOf,
  ): Vector {
    const { sensor } = this.judging.at;
    const own = sensor.positionToleranceM * RECTANGULAR;
    const moved = [draw("x", 0) * own, draw("y", 0) * own, draw("z", 0) * own];
    const tolerance = item.kind === "circuit" ? item.circuit.positionToleranceM * RECTANGULAR : 0;
    const u = draw("u", this.keyOf("u", component)) * tolerance;
    const v = draw("v", this.keyOf("v", component)) * tolerance;
    const at = (i: 0 | 1 | 2) =>
      sensor.position[i] + (moved[i] as number) - (along ? u * along.u[i] + v * along.v[i] : 0);
    return [at(0), at(1), at(2)];
  }

  private addComponent(
    groups: Float64Array,
    component: number,
    influence: Float64Array,
    scale: number,
    draw: DrawOf,
  ): void {
    const { at, measure, stride } = this.judging;
    const entry = at.plan.components[component];
    const item = entry && at.plan.items[entry.item];
    if (!entry || !item) return;
    const percent =
      item.kind === "circuit" ? item.circuit.currentTolerancePercent : item.equipment.tolerancePercent;
    const excess = draw("current", this.keyOf("current", component)) * percent * 0.01 * RECTANGULAR;
    const { currents, scaling } = entry.drive;
    const to = stride * entry.group;
    for (let k = 0; k < item.sets.length; k++) {
      const re = scale * ((currents[2 * k] as number) + excess * (scaling[2 * k] as number));
      const im = scale * ((currents[2 * k + 1] as number) + excess * (scaling[2 * k + 1] as number));
      for (let i = 0; i < measure.width; i++) {
        const g = influence[measure.width * k + i] as number;
        groups[to + i] = (groups[to + i] as number) + re * g;
        groups[to + measure.width + i] = (groups[to + measure.width + i] as number) + im * g;
      }
    }
  }

  private keyOf(kind: "current" | "u" | "v", component: number): number {
    const family = this.judging.at
      .familiesFor(this.judging.measure.width)
      .find((entry) => entry.kind === kind);
    return family?.keys[component] ?? -1;
  }
}
