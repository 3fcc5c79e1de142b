import { Refusal } from "~/domain/errors";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import type { Queryable } from "../db/client";
import { findWholeScreening } from "../db/queries/screenings";

/** A screening with its document and result read; both were valid when they were stored and never change. */
export async function readScreening(db: Queryable, organisationId: string, screeningId: string) {
  const row = await findWholeScreening(db, organisationId, screeningId);
  if (row === undefined)
    throw new Refusal(
      "not-found",
      "There is no such screening. Go back to the plan and open one of its list.",
    );
  const { document, result, ...heading } = row;
  return {
    ...heading,
    document: JSON.parse(document) as PlanDocument,
    result: JSON.parse(result) as ScreeningResult,
  };
}
