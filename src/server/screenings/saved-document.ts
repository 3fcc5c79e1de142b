import { Refusal } from "~/domain/errors";
import { db } from "../db/client";
import { findPlanDocument } from "../db/queries/plan-documents";
import type { PlanRow } from "../db/queries/plans";

/** The text of a plan's working copy as it is at `version`. @throws Refusal state.conflict where it has moved on */
export async function savedDocumentText(plan: PlanRow, version: number): Promise<string> {
  const saved = await findPlanDocument(db(), plan.organisationId, plan.id);
  if (saved === undefined) throw new Error("A plan has no document.");
  if (saved.version !== version)
    throw new Refusal(
      "state.conflict",
      `The plan is at version ${String(saved.version)} now. Load it, look at what has changed, and try again.`,
      { detail: { version: saved.version } },
    );
  return saved.document;
}
