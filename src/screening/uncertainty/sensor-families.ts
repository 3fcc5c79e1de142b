import { nearestLeg, type Leg } from "~/field/section-frames";
import type { Vector } from "~/field/vector";
import type { CompiledPlan } from "../compile";
import { componentPhasors } from "../influence";
import { gradientPhasorsAt, type SensorField } from "../sensor-field";
import { SPACING_STEP, type CircuitItem, type SourceItem } from "../source-item";
import { displacementDerivatives } from "./displacement";
import { keyed, RECTANGULAR, SENSOR_AXES, type InputFamily } from "./families";

/**
 * All uncertain inputs at one sensor that move phasors: currents and equipment tolerances, circuits' spacings and places,
 * the sensor's own place. Width 3 for fields, 9 for gradients.
 */
export function sensorFamilies(field: SensorField, width: 3 | 9, sensorToleranceM: number): InputFamily[] {
  const families = [currentFamily(field, width), spacingFamily(field, width)];
  const placed = field.plan.items.some((item) => circuitOf(item)?.circuit.positionToleranceM);
  if (placed || sensorToleranceM > 0) {
    const derivatives = displacementDerivatives(field, width);
    if (placed) families.push(...placeFamilies(field, derivatives, width));
    if (sensorToleranceM > 0)
      families.push(...sensorPlaceFamilies(field, derivatives, width, sensorToleranceM));
  }
  return families.filter((family) => family.keyCount > 0);
}

const strideOf = (width: 3 | 9): 6 | 18 => (width === 3 ? 6 : 18);

const circuitOf = (item: SourceItem | undefined): CircuitItem | null =>
  item?.kind === "circuit" ? item : null;

/** Currents: circuits of one load group move together, everything else on its own. */
function currentFamily(field: SensorField, width: 3 | 9): InputFamily {
  const { plan, position } = field;
  const stride = strideOf(width);
  const scaling = width === 3 ? field.scaling : gradientPhasorsAt(plan, position, "scaling");
  const keys = keyed(plan.components, ({ item }) => {
    const source = plan.items[item];
    if (!source || toleranceOf(source) === 0) return null;
    const group = circuitOf(source)?.circuit.loadGroup;
    return group ? `group ${group}` : `item ${item}`;
  });
  const vectors = scaling.map((value, i) => {
    const component = plan.components[Math.floor(i / stride)];
    return value * toleranceOf(component && plan.items[component.item]) * 0.01 * RECTANGULAR;
  });
  return { vectors, stride, kind: "current", ...keys };
}

function toleranceOf(item: SourceItem | undefined): number {
  if (!item) return 0;
  return item.kind === "circuit" ? item.circuit.currentTolerancePercent : item.equipment.tolerancePercent;
}

function spacingFamily({ plan, position }: SensorField, width: 3 | 9): InputFamily {
  const stride = strideOf(width);
  const keys = keyed(plan.components, ({ item }) =>
    circuitOf(plan.items[item])?.respaced ? `item ${item}` : null,
  );
  if (keys.keyCount === 0) return { vectors: new Float64Array(0), stride, kind: "spacing", ...keys };
  const wider = respacedPhasors(plan, position, width, "wider");
  const narrower = respacedPhasors(plan, position, width, "narrower");
  const vectors = wider.map((value, i) => {
    const item = circuitOf(plan.items[plan.components[Math.floor(i / stride)]?.item ?? -1]);
    const half = ((item?.circuit.spacingTolerancePercent ?? 0) * 0.01 * RECTANGULAR) / (2 * SPACING_STEP);
    return (value - (narrower[i] as number)) * half;
  });
  return { vectors, stride, kind: "spacing", ...keys };
}

function respacedPhasors(
  plan: CompiledPlan,
  position: Vector,
  width: 3 | 9,
  side: "wider" | "narrower",
): Float64Array {
  const influence = new Float64Array(width * plan.setCount);
  plan.items.forEach((item, index) => {
    const sets = circuitOf(item)?.respaced?.[side] ?? [];
    sets.forEach((set, k) => {
      const at = width * ((plan.firstSets[index] as number) + k);
      if (width === 3) set.addField(...position, influence, at);
      else set.addGradient(...position, influence, at);
    });
  });
  const out = new Float64Array(2 * width * plan.components.length);
  componentPhasors(plan, influence, width, "currents", out);
  return out;
}

/**
 * Circuits' places along u, then v, of the leg nearest to the sensor: the whole set moves rigidly, which is the sensor
 * moving the other way. Circuits in one route move together, along the route's own frame.
 */
function placeFamilies(field: SensorField, derivatives: Float64Array[], width: 3 | 9): InputFamily[] {
  const { plan, position } = field;
  const stride = strideOf(width);
  const keys = keyed(plan.components, ({ item }) => {
    const source = circuitOf(plan.items[item]);
    if (!source || source.circuit.positionToleranceM === 0) return null;
    return source.circuit.route ? `route ${source.circuit.route.id}` : `item ${item}`;
  });
  const legs = plan.items.map((item) => frameOf(plan, item, position));
  return (["u", "v"] as const).map((axis) => {
    const vectors = new Float64Array(stride * plan.components.length);
    plan.components.forEach(({ item }, component) => {
      const direction = legs[item]?.[axis];
      const source = circuitOf(plan.items[item]);
      if (!direction || !source) return;
      const shift = -source.circuit.positionToleranceM * RECTANGULAR;
      for (let i = stride * component; i < stride * (component + 1); i++) {
        vectors[i] = shift * directional(derivatives, direction, i);
      }
    });
    return { vectors, stride, kind: axis, ...keys };
  });
}

/** The frame along which a circuit's place is uncertain; null where it is certain. */
export function frameOf(plan: CompiledPlan, item: SourceItem, position: Vector): Leg | null {
  const source = circuitOf(item);
  if (!source || source.circuit.positionToleranceM === 0) return null;
  return nearestLeg(legsOf(plan, source), position).leg;
}

function legsOf(plan: CompiledPlan, item: CircuitItem) {
  return (item.circuit.route && plan.routes.legsOf(item.circuit.route.id)) ?? item.legs;
}

function directional(derivatives: Float64Array[], direction: Vector, i: number): number {
  return derivatives.reduce(
    (sum, column, axis) => sum + (column[i] as number) * (direction[axis] as number),
    0,
  );
}

/** The sensor's own place on x, y and z: every component moves. */
function sensorPlaceFamilies(
  { plan }: SensorField,
  derivatives: Float64Array[],
  width: 3 | 9,
  toleranceM: number,
): InputFamily[] {
  const keys = new Int32Array(plan.components.length);
  return derivatives.map((column, axis) => ({
    vectors: column.map((value) => value * toleranceM * RECTANGULAR),
    stride: strideOf(width),
    keys,
    keyCount: 1,
    kind: SENSOR_AXES[axis] ?? "z",
  }));
}
