import type { Sensor } from "~/domain/plan-document/sensor";
import { distanceToLeg } from "~/field/vector";
import type { CompiledPlan } from "../compile";
import type { CircuitItem } from "../source-item";
import { nearnessTo, reachM } from "./near-conductors";

/** What the result must say about where a sensor stands, and whether its verdict can be no better than undecided for it. */
export interface PositionCheck {
  warnings: string[];
  capped: boolean;
}

/** Judges sensors' places against conductors; reaches are computed once per circuit. */
export class PositionChecks {
  private readonly reaches = new Map<CircuitItem, number>();

  constructor(private readonly plan: CompiledPlan) {}

  check(sensor: Sensor): PositionCheck {
    const warnings: string[] = [];
    let capped = false;
    for (const item of this.plan.items) {
      if (item.kind !== "circuit" || !this.mayTouch(item, sensor)) continue;
      const nearness = nearnessTo(item, sensor.position);
      if (nearness === "clear") continue;
      const where = `Sensor "${sensor.name}" (${sensor.id}) lies inside a conductor of "${item.circuit.name}" (${item.id})`;
      if (nearness === "inside") warnings.push(`${where}.`);
      else {
        warnings.push(`${where}, within two radii of a bend or end, where no accuracy is claimed.`);
        capped = true;
      }
    }
    return { warnings, capped };
  }

  private mayTouch(item: CircuitItem, { position }: Sensor): boolean {
    let reach = this.reaches.get(item);
    if (reach === undefined) {
      reach = reachM(item) + item.conductorRadiusM;
      this.reaches.set(item, reach);
    }
    for (const { start, end } of item.legs) if (distanceToLeg(start, end, position) <= reach) return true;
    return false;
  }
}
