import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { worstVerdict, type ScreeningResult, type SensorResult } from "~/domain/screening-result";
import { circulationError } from "./checks/circulation-check";
import { openEnds } from "./checks/open-ends";
import type { WaitingCircuit } from "./compile";
import { earthWarnings } from "./earth";
import { ENGINE_VERSION } from "./engine-version";
import { leftOut } from "./left-out";
import { preparePlan, screenSensor } from "./prepared-plan";
import { runSteps, type ScreenOptions, type Steps } from "./steps";
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
  const prepared = preparePlan(document);
  const { resolved, earth, plan, hash } = prepared;
  const waiting = plan.waiting.length > 0;
  const warnings = [...plan.waiting.map(waitingText), ...plan.warnings, ...earthWarnings(earth)];

  const sensors: SensorResult[] = [];
  for (let index = 0; index < resolved.sensors.length; index++) {
    yield { done: sensors.length, total: resolved.sensors.length };
    const screened = screenSensor(prepared, index);
    warnings.push(...screened.warnings);
    sensors.push(screened.result);
  }
  yield { done: sensors.length, total: sensors.length };

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
      openEnds: openEnds(plan),
      warnings,
    },
    leftOut: leftOut(resolved),
  };
}

function waitingText({ id, name, missing }: WaitingCircuit): string {
  const what = missing
    .map((part) => (part === "path" ? "is not traced" : "has no current yet"))
    .join(" and ");
  return `Circuit "${name}" (${id}) ${what}: no verdict is better than undecided.`;
}
