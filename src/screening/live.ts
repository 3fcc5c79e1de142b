import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { resolveDefaults } from "~/domain/plan-document/resolved";
import type { ScreeningResult } from "~/domain/screening-result";
import { hashOfResolved } from "./input-hash";
import { preparePlan, type PreparedPlan, type ScreenedSensor } from "./prepared-plan";
import { checkSources, resultOf, screenSensors, type SourceChecks } from "./screen";
import type { Steps } from "./steps";

interface Last {
  prepared: PreparedPlan;
  checks: SourceChecks;
  sensors: ScreenedSensor[];
  /** All that every sensor is judged by, as text. */
  common: string;
  /** Each sensor, as text. */
  each: string[];
}

/**
 * Screens one document after another of the same plan as it is edited, each to what `screen` gives. Where nothing but sensors changed,
 * the prepared plan is kept and only the changed sensors are judged; anything else is screened afresh.
 */
export class LiveScreener {
  private last: Last | null = null;

  /** In steps, one a sensor that is judged. A screening left off half-way leaves what is known as it was. */
  *steps(document: PlanDocument): Steps<ScreeningResult> {
    const common = commonText(document);
    const each = document.sensors.map((sensor) => JSON.stringify(sensor));
    const { last } = this;
    const kept = last?.common === common ? last : null;
    const prepared = kept ? withSensorsOf(kept.prepared, document) : preparePlan(document);
    const known = kept ? each.map((text, i) => (text === kept.each[i] ? kept.sensors[i] : undefined)) : [];
    const sensors = yield* screenSensors(prepared, known);
    const checks = kept?.checks ?? checkSources(prepared);
    this.last = { prepared, checks, sensors, common, each };
    return resultOf(prepared, sensors, checks);
  }
}

/** Backgrounds belong to it, for their frequencies are among the plan's; so do the limits, by which documents are refused. */
function commonText({ name: _name, drawing: _drawing, sensors, ...sources }: PlanDocument): string {
  return JSON.stringify([sources, sensors.map(({ limits, background }) => [limits, background])]);
}

function withSensorsOf(prepared: PreparedPlan, document: PlanDocument): PreparedPlan {
  const resolved = resolveDefaults(document);
  return { ...prepared, resolved, hash: hashOfResolved(resolved) };
}
