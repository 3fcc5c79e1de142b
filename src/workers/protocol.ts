import type { Clearing, ClearingRequest } from "~/domain/clearing";
import type { DocumentFault } from "~/domain/plan-document/faults";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import type { FieldMap, FieldMapRequest } from "~/screening/field-map";

/** What a screening worker is asked to do; `id` names the job in every answer. */
export type WorkerRequest =
  | { type: "screen"; id: number; document: PlanDocument }
  | { type: "map"; id: number; document: PlanDocument; request: FieldMapRequest }
  | { type: "clearing"; id: number; document: PlanDocument; request: ClearingRequest }
  | { type: "cancel"; id: number };

/** What it answers: progress any number of times, then one of done or failed; nothing more after a cancel. */
export type WorkerResponse =
  | { type: "progress"; id: number; done: number; total: number }
  | { type: "screened"; id: number; result: ScreeningResult }
  | { type: "mapped"; id: number; map: FieldMap }
  | { type: "cleared"; id: number; clearing: Clearing }
  | { type: "failed"; id: number; message: string; faults: DocumentFault[] };

/** Told how many of how many sensors or rows are done. */
export type OnProgress = (done: number, total: number) => void;

/** A screening that failed in a worker. `faults` is not empty where the document was refused. */
export class ScreeningFailedError extends Error {
  override name = "ScreeningFailedError";

  constructor(
    message: string,
    readonly faults: DocumentFault[] = [],
  ) {
    super(message);
  }
}

export type { FieldMap, FieldMapRequest, MapGrid, MapQuantity } from "~/screening/field-map";
