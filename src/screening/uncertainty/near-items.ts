import type { Sensor } from "~/domain/plan-document/sensor";
import { fillSetsField, packSets, type ConductorSet } from "~/field/conductor-set";
import type { Vector } from "~/field/vector";
import type { CompiledPlan } from "../compile";
import type { CaseFactors } from "../load-cases";
import type { SourceItem } from "../source-item";
import { RECTANGULAR, SENSOR_AXES, type FamilyKind, type InputFamily } from "./families";
import type { InputVector } from "./input-vectors";
import type { RandomStream } from "./random";
import { frameOf } from "./sensor-families";

interface NearItem {
  item: SourceItem;
  components: number[];
  /** Key of the item's current in its family; −1 where it is certain. */
  currentKey: number;
  /** Influence matrix of the item's sets: all draws of one set after another. */
  influence: Float64Array;
}

/**
 * Items close to one sensor, computed anew for every draw of their place and of the sensor's. The places are drawn once a sensor, so
 * that limits and load cases share what they cost.
 */
export class NearItems {
  private readonly items: NearItem[];
  private readonly places = new Map<string, Float64Array>();

  constructor(
    private readonly plan: CompiledPlan,
    private readonly sensor: Sensor,
    private readonly width: 3 | 9,
    private readonly families: readonly InputFamily[],
    indices: readonly number[],
    private readonly drawCount: number,
    random: RandomStream,
  ) {
    this.items = indices.flatMap((index) => {
      const item = plan.items[index];
      const components = plan.components.flatMap((component, c) => (component.item === index ? [c] : []));
      const [first] = components;
      if (!item || first === undefined) return [];
      const influence = this.drawnInfluence(item, first, random);
      return [{ item, components, currentKey: this.keyOf("current", first), influence }];
    });
  }

  /** Whether near items look at the draws of an input. */
  uses(kind: InputVector["kind"], key: number): boolean {
    if (kind === "current") return this.items.some(({ currentKey }) => currentKey === key);
    return this.places.has(`${kind} ${key}`);
  }

  /** The draws of a place that near items share with the rest; undefined where none of them depends on it. */
  drawsOf(kind: string, key: number): Float64Array | undefined {
    return this.places.get(`${kind} ${key}`);
  }

  /** Adds the items' included components in one draw to the groups; `currentDraw` gives the draw of a current's key. */
  addTo(
    groups: Float64Array,
    draw: number,
    factors: CaseFactors,
    included: readonly boolean[],
    currentDraw: (key: number) => number,
  ): void {
    for (const { item, components, currentKey, influence } of this.items) {
      const percent =
        item.kind === "circuit" ? item.circuit.currentTolerancePercent : item.equipment.tolerancePercent;
      const excess = currentDraw(currentKey) * percent * 0.01 * RECTANGULAR;
      for (const component of components) {
        if (included[component]) this.addComponent(groups, component, influence, draw, factors, excess);
      }
    }
  }

  private addComponent(
    groups: Float64Array,
    component: number,
    influence: Float64Array,
    draw: number,
    factors: CaseFactors,
    excess: number,
  ): void {
    const entry = this.plan.components[component];
    const item = entry && this.plan.items[entry.item];
    if (!entry || !item) return;
    const { width } = this;
    const scale = (factors.items[entry.item] as number) * item.shieldingFactor;
    const { currents, scaling } = entry.drive;
    const to = 2 * width * entry.group;
    for (let k = 0; k < item.sets.length; k++) {
      const re = scale * ((currents[2 * k] as number) + excess * (scaling[2 * k] as number));
      const im = scale * ((currents[2 * k + 1] as number) + excess * (scaling[2 * k + 1] as number));
      const from = width * (k * this.drawCount + draw);
      for (let i = 0; i < width; i++) {
        const g = influence[from + i] as number;
        groups[to + i] = (groups[to + i] as number) + re * g;
        groups[to + width + i] = (groups[to + width + i] as number) + im * g;
      }
    }
  }

  /** The sensor moves itself, and the item moves the other way: the sets are looked at from the difference. */
  private drawnInfluence(item: SourceItem, component: number, random: RandomStream): Float64Array {
    const { sensor, width, drawCount } = this;
    const along = frameOf(this.plan, item, sensor.position);
    const own = SENSOR_AXES.map((axis) => this.placeDraws(axis, 0, sensor.positionToleranceM, random));
    const tolerance = item.kind === "circuit" ? item.circuit.positionToleranceM : 0;
    const u = this.placeDraws("u", this.keyOf("u", component), tolerance, random);
    const v = this.placeDraws("v", this.keyOf("v", component), tolerance, random);
    const points = new Float64Array(3 * drawCount);
    for (let draw = 0; draw < drawCount; draw++) {
      for (let i = 0; i < 3; i++) {
        const moved = (own[i]?.[draw] ?? 0) * sensor.positionToleranceM * RECTANGULAR;
        const [ui, vi] = [along?.u[i] ?? 0, along?.v[i] ?? 0];
        const away = ((u?.[draw] ?? 0) * ui + (v?.[draw] ?? 0) * vi) * tolerance * RECTANGULAR;
        points[3 * draw + i] = (sensor.position[i] as number) + moved - away;
      }
    }
    return influenceOver(item.sets, width, points);
  }

  private placeDraws(
    kind: FamilyKind,
    key: number,
    toleranceM: number,
    random: RandomStream,
  ): Float64Array | null {
    if (toleranceM === 0) return null;
    const name = `${kind} ${key}`;
    let draws = this.places.get(name);
    if (!draws) {
      draws = Float64Array.from({ length: this.drawCount }, () => random.rectangular());
      this.places.set(name, draws);
    }
    return draws;
  }

  private keyOf(kind: FamilyKind, component: number): number {
    return this.families.find((entry) => entry.kind === kind)?.keys[component] ?? -1;
  }
}

function influenceOver(sets: readonly ConductorSet[], width: 3 | 9, points: Float64Array): Float64Array {
  const drawCount = points.length / 3;
  const influence = new Float64Array(drawCount * width * sets.length);
  if (width === 3) {
    fillSetsField(packSets(sets), points, influence);
    return influence;
  }
  sets.forEach((set, k) => {
    for (let draw = 0; draw < drawCount; draw++) {
      const [x, y, z] = [points[3 * draw], points[3 * draw + 1], points[3 * draw + 2]] as Vector;
      set.addGradient(x, y, z, influence, width * (k * drawCount + draw));
    }
  });
  return influence;
}
