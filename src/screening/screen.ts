import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Sensor } from "~/domain/plan-document/sensor";
import { worstVerdict, type ScreeningResult, type SensorResult } from "~/domain/screening-result";
import { resolveDefaults } from "~/domain/plan-document/resolved";
import { circulationError } from "./checks/circulation-check";
import { openEnds, openEndText } from "./checks/open-ends";
import { checkPosition } from "./checks/position-warnings";
import { compilePlan, type CompiledPlan, type WaitingCircuit } from "./compile";
import { earthWarnings, planEarth, type PlanEarth } from "./earth";
import { ENGINE_VERSION } from "./engine-version";
import { hashOfResolved } from "./input-hash";
import { judgeLimit } from "./judge-limit";
import { LimitJudging, SensorJudging } from "./judging";
import { leftOut } from "./left-out";
import { runSteps, type ScreenOptions, type Steps } from "./steps";
import { uncertaintiesOf, type UncertaintyOf } from "./uncertainty/uncertainty";
import { cappedVerdict } from "./verdict";

/**
 * Screens a document: every limit of every sensor in every load case. Pure: equal documents give equal results, byte for byte.
 * Throws RefusedDocumentError for documents that parse and yet cannot be computed.
 */
export function screen(document: PlanDocument, options: ScreenOptions = {}): ScreeningResult {
  return runSteps(screenSteps(document), options);
}

/** The same in steps, one a sensor, so that a worker can look at its messages between them. */
export function* screenSteps(document: PlanDocument): Steps<ScreeningResult> {
  const resolved = resolveDefaults(document);
  const earth = planEarth(resolved);
  const plan = compilePlan(resolved);
  const hash = hashOfResolved(resolved);
  const waiting = plan.waiting.length > 0;
  const warnings = [...plan.waiting.map(waitingText), ...plan.warnings, ...earthWarnings(earth)];

  const sensors: SensorResult[] = [];
  for (const sensor of resolved.sensors) {
    yield { done: sensors.length, total: resolved.sensors.length };
    const position = checkPosition(plan, sensor);
    warnings.push(...position.warnings);
    const uncertaintyOf = uncertaintiesOf(hash, sensors.length);
    sensors.push(screenSensor(plan, sensor, earth, waiting || position.capped, uncertaintyOf));
  }
  yield { done: sensors.length, total: sensors.length };

  const ends = openEnds(plan);
  return {
    format: "stillneedle-result",
    version: 1,
    inputHash: hash,
    engineVersion: ENGINE_VERSION,
    verdict: cappedVerdict(worstVerdict(sensors.map(({ verdict }) => verdict)), waiting),
    earthField: earth?.elements ?? null,
    sensors,
    checks: {
      circulationError: circulationError(plan),
      openEnds: ends,
      warnings: [...warnings, ...ends.map(openEndText)],
    },
    leftOut: leftOut(resolved),
  };
}

function screenSensor(
  plan: CompiledPlan,
  sensor: Sensor,
  earth: PlanEarth | null,
  capped: boolean,
  uncertaintyOf: UncertaintyOf,
): SensorResult {
  const judging = new SensorJudging(plan, sensor, earth);
  const findings = sensor.limits.map((limit) =>
    judgeLimit(new LimitJudging(judging, limit), capped, uncertaintyOf),
  );
  return { id: sensor.id, verdict: worstVerdict(findings.map(({ verdict }) => verdict)), findings };
}

function waitingText({ id, name, missing }: WaitingCircuit): string {
  const what = missing
    .map((part) => (part === "path" ? "is not traced" : "has no current yet"))
    .join(" and ");
  return `Circuit "${name}" (${id}) ${what}: no verdict is better than undecided.`;
}
