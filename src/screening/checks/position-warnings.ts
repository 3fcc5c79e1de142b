import type { Sensor } from "~/domain/plan-document/sensor";
import { distanceToLeg } from "~/field/vector";
import type { CompiledPlan } from "../compile";
import type { CircuitItem } from "../source-item";
import { nearnessToEquipment } from "./near-equipment";
import { nearnessTo, reachOf } from "./near-conductors";

/** What the result must say about where a sensor stands, and whether its verdict can be no better than undecided for it. */
export interface PositionCheck {
  warnings: string[];
  capped: boolean;
}

/** Judges a sensor's place against conductors and equipment. */
export function checkPosition(plan: CompiledPlan, sensor: Sensor): PositionCheck {
  const warnings: string[] = [];
  let capped = false;
  for (const item of plan.items) {
    if (item.kind !== "circuit" || !mayTouch(item, sensor)) continue;
    const nearness = nearnessTo(item, sensor.position);
    if (nearness === "clear") continue;
    const where = `Sensor "${sensor.name}" (${sensor.id}) lies inside a conductor of "${item.circuit.name}" (${item.id})`;
    if (nearness === "inside") warnings.push(`${where}.`);
    else {
      warnings.push(`${where}, within two radii of a bend or end, where no accuracy is claimed.`);
      capped = true;
    }
  }
  for (const equipment of plan.document.equipment) {
    const near = nearnessToEquipment(equipment, sensor.position);
    if (!near) continue;
    warnings.push(
      `Sensor "${sensor.name}" (${sensor.id}) and "${equipment.name}" (${equipment.id}): it ${near.text}.`,
    );
    capped ||= near.capped;
  }
  return { warnings, capped };
}

function mayTouch(item: CircuitItem, { position }: Sensor): boolean {
  const lookM = reachOf(item) + item.conductorRadiusM;
  return item.legs.some(({ start, end }) => distanceToLeg(start, end, position) <= lookM);
}
