import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { plainText } from "~/domain/plain-text";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { positionsWorstFirst } from "~/domain/positions";
import { revisionLetters } from "~/domain/revision";
import type { ScreeningResult } from "~/domain/screening-result";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import { isDuplicateEntry } from "../db/duplicate-entry";
import { findDrawing } from "../db/queries/drawings";
import type { PlanRow } from "../db/queries/plans";
import {
  insertRevision,
  insertRevisionEditors,
  listPlanEditors,
  lockWorkingCopy,
  nextRevisionOrdinal,
} from "../db/queries/revisions";
import { findWholeScreening } from "../db/queries/screenings";
import { screenPlan } from "../screenings/screen-plan";
import { sealOf, sha256Of } from "./seal";
import { revisionPage } from "./open-revision";
import { tellOfSubmission } from "./tell";

export const submitInput = z.strictObject({
  /** The version of the working copy that the person has before them. */
  version: z.int().min(1),
  note: plainText("The note").default(""),
});

export interface Submitted {
  id: string;
  letters: string;
  url: string;
}

/**
 * Screens the working copy and freezes it as the plan's next revision, under review.
 * @param signal aborted when nobody waits for the answer any more
 * @throws Refusal state.conflict where the working copy has moved on or a revision is under review already;
 *   input.refused without a position; what a screening refuses
 */
export async function submitRevision(
  member: Member,
  plan: PlanRow,
  { version, note }: z.output<typeof submitInput>,
  signal?: AbortSignal,
): Promise<Submitted> {
  const { id: screeningId } = await screenPlan(member, plan, version, signal);
  return freezeRevision(member, plan, screeningId, note);
}

/** Freezes what was screened, as long as the working copy is still that. @throws Refusal as `submitRevision` */
export async function freezeRevision(
  member: Member,
  plan: PlanRow,
  screeningId: string,
  note: string,
): Promise<Submitted> {
  const { organisationId } = plan;
  const screened = await findWholeScreening(db(), organisationId, screeningId);
  if (screened === undefined) throw new Error("The screening of a revision is not there.");
  const document = JSON.parse(screened.document) as PlanDocument;
  const result = JSON.parse(screened.result) as ScreeningResult;
  if (result.sensors.length === 0)
    throw new Refusal(
      "input.refused",
      "The plan has no position, so there is nothing to review. Place a sensor first.",
    );
  const drawing = await frozenDrawing(db(), plan, document);
  const id = crypto.randomUUID();
  const submittedAt = new Date();
  const hashes = {
    documentSha256: sha256Of(screened.document),
    drawingSha256: drawing?.sha256 ?? null,
    resultSha256: sha256Of(screened.result),
    engineVersion: screened.engineVersion,
  };
  const freeze = async (tx: Queryable): Promise<Submitted> => {
    const present = await lockWorkingCopy(tx, organisationId, plan.id);
    if (present !== screened.documentVersion)
      throw new Refusal(
        "state.conflict",
        `The plan is at version ${String(present)} now. Look at what has changed, and submit it again.`,
        { detail: { version: present } },
      );
    const ordinal = await nextRevisionOrdinal(tx, plan.id);
    const editors = await listPlanEditors(tx, organisationId, plan.id);
    const revision = { id, organisationId, planId: plan.id, ordinal, submittedBy: member.userId };
    await insertRevision(
      tx,
      { ...revision, state: "under-review", underReviewOf: plan.id, note, submittedAt },
      {
        revisionId: id,
        screeningId,
        documentVersion: screened.documentVersion,
        document: screened.document,
        drawingId: drawing?.id ?? null,
        result: screened.result,
        inputHash: screened.inputHash,
        verdict: screened.verdict,
        ...hashes,
        sealSha256: sealOf(hashes),
      },
      positionsWorstFirst(document, result).map(({ sensor, verdict, governing }) => ({
        revisionId: id,
        sensorId: sensor.id,
        sensorName: sensor.name,
        verdict,
        budgetUsed: governing?.budgetUsed ?? 0,
      })),
    );
    await insertRevisionEditors(
      tx,
      editors.map(({ userId, lastEditedAt }) => ({ revisionId: id, userId, lastEditedAt })),
    );
    await tellOfSubmission(tx, plan, { ...revision, note }, editors);
    await recordActivity(tx, {
      organisationId,
      actorId: member.userId,
      event: "revision.submitted",
      subjectKind: "revision",
      subjectId: id,
      detail: {
        planId: plan.id,
        revision: revisionLetters(ordinal),
        version: screened.documentVersion,
        seal: sealOf(hashes),
      },
    });
    return { id, letters: revisionLetters(ordinal), url: revisionPage({ planId: plan.id, id }) };
  };
  try {
    return await db().transaction(freeze);
  } catch (error) {
    if (!isDuplicateEntry(error, "revisions_under_review")) throw error;
    throw new Refusal(
      "state.conflict",
      "A revision of this plan is under review already. Wait until it is released or returned.",
      { cause: error },
    );
  }
}

async function frozenDrawing(tx: Queryable, plan: PlanRow, { drawing }: PlanDocument) {
  const drawingId = drawing.sheet?.drawingId;
  if (drawingId === undefined) return null;
  const row = await findDrawing(tx, plan.organisationId, plan.id, drawingId);
  if (row === undefined) throw new Error("A working copy refers to a drawing that is not there.");
  return row;
}
