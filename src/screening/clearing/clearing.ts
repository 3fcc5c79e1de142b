import type { Clearing, ClearingRequest, SensorClearing } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { ENGINE_VERSION } from "../engine-version";
import { preparePlan, screenSensor, type PreparedPlan } from "../prepared-plan";
import { runSteps, type ScreenOptions, type Steps } from "../steps";
import { allowableCurrentsOf } from "./allowable-currents";
import { singleChangesOf } from "./changes/single-changes";
import { clearPositionsOf } from "./clear-positions";
import { complianceDistances } from "./compliance-distances";
import { waitingCurrentsOf } from "./waiting-currents";

/**
 * What would clear a document's flagged sensors. Pure: equal documents and requests give equal answers. Sensors that are within
 * are left out of the answer. Throws RefusedDocumentError as `screen` does.
 */
export function clearing(
  document: PlanDocument,
  request: ClearingRequest,
  options: ScreenOptions = {},
): Clearing {
  return runSteps(clearingSteps(document, request), options);
}

/** The same in steps; their progress is that of the part at hand. */
export function* clearingSteps(
  document: PlanDocument,
  { sensorIds, parts }: ClearingRequest,
): Steps<Clearing> {
  const prepared = preparePlan(document);
  const targets = yield* flaggedIndices(document, prepared, sensorIds);
  const sensors: SensorClearing[] = [];
  for (const index of targets) {
    const { result } = screenSensor(prepared, index);
    sensors.push({
      id: result.id,
      verdict: result.verdict,
      positions: parts.includes("positions") ? yield* clearPositionsOf(document, prepared, index) : null,
      currents: parts.includes("currents")
        ? yield* allowableCurrentsOf(document, prepared, index, result)
        : [],
      waiting: parts.includes("currents") ? yield* waitingCurrentsOf(document, index) : [],
    });
  }
  return {
    format: "stillneedle-clearing",
    version: 1,
    inputHash: prepared.hash,
    engineVersion: ENGINE_VERSION,
    sensors,
    changes:
      parts.includes("changes") && targets.length > 0
        ? yield* singleChangesOf(document, prepared, targets)
        : [],
    distances: parts.includes("distances") ? yield* complianceDistances(document) : null,
  };
}

function* flaggedIndices(
  document: PlanDocument,
  prepared: PreparedPlan,
  sensorIds: readonly string[] | null,
): Steps<number[]> {
  const flagged: number[] = [];
  for (const [index, { id }] of document.sensors.entries()) {
    if (sensorIds && !sensorIds.includes(id)) continue;
    yield { done: index, total: document.sensors.length };
    if (screenSensor(prepared, index).result.verdict !== "within") flagged.push(index);
  }
  return flagged;
}
