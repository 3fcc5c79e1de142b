import { z } from "zod";
import type { Member } from "~/domain/permissions";
import type { Verdict } from "~/domain/screening-result";
import type { ScreenedText } from "~/workers/text-protocol";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { type FindingRow, insertFindings } from "../db/queries/findings";
import type { PlanRow } from "../db/queries/plans";
import { insertScreening } from "../db/queries/screenings";
import { runScreening } from "./run-screening";
import { savedDocumentText } from "./saved-document";

/** The version of the working copy that the person has before them. */
export const screeningInput = z.strictObject({ version: z.int().min(1) });

export interface StoredScreening {
  id: string;
  url: string;
  verdict: Verdict;
}

/**
 * Screens a plan's working copy as it is at `version`, and stores document, result and findings.
 * @param signal aborted when nobody waits for the answer any more; nothing is stored then
 * @throws Refusal state.conflict where the working copy has moved on; document.refused with faults; screening.timed-out
 */
export async function screenPlan(
  member: Member,
  plan: PlanRow,
  version: number,
  signal?: AbortSignal,
): Promise<StoredScreening> {
  const { organisationId } = plan;
  const document = await savedDocumentText(plan, version);
  const screened = await runScreening(document, signal);
  const id = crypto.randomUUID();
  await db().transaction(async (tx) => {
    await insertScreening(tx, {
      id,
      organisationId,
      planId: plan.id,
      documentVersion: version,
      inputHash: screened.inputHash,
      engineVersion: screened.engineVersion,
      verdict: screened.verdict,
      document,
      result: screened.text,
      screenedBy: member.userId,
      screenedAt: new Date(),
    });
    await insertFindings(tx, findingRows(id, screened));
    await recordActivity(tx, {
      organisationId,
      actorId: member.userId,
      event: "plan.screened",
      subjectKind: "screening",
      subjectId: id,
      detail: { planId: plan.id, version, verdict: screened.verdict },
    });
  });
  return { id, url: `/plans/${plan.id}/screenings/${id}`, verdict: screened.verdict };
}

const findingRows = (screeningId: string, { findings }: ScreenedText): FindingRow[] =>
  findings.map(({ limit, ...finding }) => ({ ...finding, screeningId, limitValue: limit }));
