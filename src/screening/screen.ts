import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { worstVerdict, type ScreeningResult } from "~/domain/screening-result";
import { circulationError } from "./checks/circulation-check";
import { openEnds } from "./checks/open-ends";
import type { WaitingCircuit } from "./compile";
import { earthWarnings } from "./earth";
import { ENGINE_VERSION } from "./engine-version";
import { leftOut } from "./left-out";
import { preparePlan, screenSensor, type PreparedPlan, type ScreenedSensor } from "./prepared-plan";
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
  const sensors = yield* screenSensors(prepared, []);
  return resultOf(prepared, sensors, checkSources(prepared));
}

/** Judges every sensor in steps but those that are known, by their place in the document. */
export function* screenSensors(
  prepared: PreparedPlan,
  known: readonly (ScreenedSensor | undefined)[],
): Steps<ScreenedSensor[]> {
  const total = prepared.resolved.sensors.length;
  const screened: ScreenedSensor[] = [];
  for (let index = 0; index < total; index++) {
    const one = known[index];
    if (!one) yield { done: index, total };
    screened.push(one ?? screenSensor(prepared, index));
  }
  yield { done: total, total };
  return screened;
}

/** The self-checks that ask nothing of the sensors. */
export interface SourceChecks {
  circulationError: number | null;
  openEnds: ScreeningResult["checks"]["openEnds"];
}

export function checkSources({ plan }: PreparedPlan): SourceChecks {
  return { circulationError: circulationError(plan), openEnds: openEnds(plan) };
}

export function resultOf(
  { resolved, earth, plan, hash }: PreparedPlan,
  screened: readonly ScreenedSensor[],
  checks: SourceChecks,
): ScreeningResult {
  const sensors = screened.map(({ result }) => result);
  const worst = worstVerdict(sensors.map(({ verdict }) => verdict));
  const warnings = [
    ...plan.waiting.map(waitingText),
    ...plan.warnings,
    ...earthWarnings(earth),
    ...screened.flatMap((sensor) => sensor.warnings),
  ];
  return {
    format: "stillneedle-result",
    version: 1,
    inputHash: hash,
    engineVersion: ENGINE_VERSION,
    verdict: cappedVerdict(worst, plan.waiting.length > 0),
    earthField: earth?.elements ?? null,
    sensors,
    checks: { ...checks, warnings },
    leftOut: leftOut(resolved),
  };
}

function waitingText({ id, name, missing }: WaitingCircuit): string {
  const what = missing
    .map((part) => (part === "path" ? "is not traced" : "has no current yet"))
    .join(" and ");
  return `Circuit "${name}" (${id}) ${what}: no verdict is better than undecided.`;
}
