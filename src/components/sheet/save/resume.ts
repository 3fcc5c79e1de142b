import type { SavedPlan } from "~/client/plan-calls";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { sameJson } from "~/sheet/difference";
import { emptyHistory, type History } from "~/sheet/history";
import type { PlanDraft } from "./use-autosave";

export interface Start {
  document: PlanDocument;
  history: History;
  /** What saving goes on from: the version that `document` was made out of, and what it held. */
  saved: SavedPlan;
  /** When the edits were made that the server had not got; null where it has all of them. */
  restoredFrom: string | null;
}

const fresh = (saved: SavedPlan, history: History): Start => ({
  document: saved.document,
  history,
  saved,
  restoredFrom: null,
});

/**
 * Where work goes on: from what the server holds and what this device kept. Unsaved edits are put back on the version
 * they were made on; if somebody else has saved since, the next save finds the conflict and asks.
 */
export function resume(saved: SavedPlan, draft: PlanDraft | null): Start {
  if (draft === null) return fresh(saved, emptyHistory);
  if (sameJson(draft.document, saved.document)) return fresh(saved, draft.history);
  if (sameJson(draft.document, draft.base)) return fresh(saved, emptyHistory);
  return {
    document: draft.document,
    history: draft.history,
    saved: { ...saved, version: draft.baseVersion, document: draft.base },
    restoredFrom: draft.keptAt,
  };
}

/** Where work goes on while the server can't be reached. */
export const resumeOffline = (draft: PlanDraft): Start => ({
  document: draft.document,
  history: draft.history,
  saved: { version: draft.baseVersion, document: draft.base, savedAt: draft.keptAt, savedByName: "" },
  restoredFrom: draft.keptAt,
});
