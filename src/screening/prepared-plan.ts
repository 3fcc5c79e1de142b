import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { resolveDefaults, type ResolvedPlanDocument } from "~/domain/plan-document/resolved";
import { worstVerdict, type SensorResult } from "~/domain/screening-result";
import { checkPosition } from "./checks/position-warnings";
import { compilePlan, type CompiledPlan } from "./compile";
import { planEarth, type PlanEarth } from "./earth";
import { hashOfResolved, hashOfSources } from "./input-hash";
import { judgeLimit } from "./judge-limit";
import { LimitJudging, SensorJudging } from "./judging";
import { uncertaintiesOf } from "./uncertainty/uncertainty";

/** All of a document that its sensors are judged by. */
export interface PreparedPlan {
  resolved: ResolvedPlanDocument;
  earth: PlanEarth | null;
  plan: CompiledPlan;
  /** The input hash. */
  hash: string;
  /** Hash of all but the sensors, which seeds Monte Carlo: a sensor's figures do not depend on where others stand. */
  seed: string;
}

/** Throws RefusedDocumentError for documents that parse and yet cannot be computed. */
export function preparePlan(document: PlanDocument): PreparedPlan {
  const resolved = resolveDefaults(document);
  const earth = planEarth(resolved);
  const plan = compilePlan(resolved);
  return { resolved, earth, plan, hash: hashOfResolved(resolved), seed: hashOfSources(resolved) };
}

/** A sensor's part of a result, with what the result must say about where it stands. */
export interface ScreenedSensor {
  result: SensorResult;
  warnings: string[];
}

/** Judges the sensor at `index` of the document on all its limits. */
export function screenSensor({ resolved, earth, plan, seed }: PreparedPlan, index: number): ScreenedSensor {
  const sensor = resolved.sensors[index];
  if (!sensor) throw new RangeError(`the document has no sensor number ${index}`);
  const { warnings, capped } = checkPosition(plan, sensor);
  const judging = new SensorJudging(plan, sensor, earth);
  const uncertaintyOf = uncertaintiesOf(seed, index);
  const isCapped = plan.waiting.length > 0 || capped;
  const findings = sensor.limits.map((limit) =>
    judgeLimit(new LimitJudging(judging, limit), isCapped, uncertaintyOf),
  );
  const verdict = worstVerdict(findings.map((finding) => finding.verdict));
  return { result: { id: sensor.id, verdict, findings }, warnings };
}
