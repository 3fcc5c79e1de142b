import type { Member } from "~/domain/permissions";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { type ChangedVerdict, changedVerdicts, largestDifference } from "~/domain/recomputation";
import { revisionLetters } from "~/domain/revision";
import type { ScreeningResult } from "~/domain/screening-result";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import type { RevisionRow } from "../db/queries/revisions";
import { runScreening } from "../screenings/run-screening";
import { contentsOf } from "./open-revision";
import { sha256Of } from "./seal";

export interface Recomputed {
  engineVersion: string;
  engineVersionThen: string;
  sameBytes: boolean;
  largestDifference: number | null;
  changedVerdicts: (ChangedVerdict & { sensorName: string })[];
}

/**
 * Screens what the revision froze once more and says how it differs from what it froze; the revision stays as it is.
 * @param signal aborted when nobody waits for the answer any more
 * @throws Refusal as a screening does
 */
export async function recompute(
  member: Member,
  revision: RevisionRow,
  signal?: AbortSignal,
): Promise<Recomputed> {
  const contents = await contentsOf(db(), revision);
  const { text } = await runScreening(contents.document, signal);
  const now = JSON.parse(text) as ScreeningResult;
  const then = JSON.parse(contents.result) as ScreeningResult;
  const { sensors } = JSON.parse(contents.document) as PlanDocument;
  const names = new Map(sensors.map(({ id, name }) => [id, name]));
  const sameBytes = sha256Of(text) === contents.resultSha256;
  const verdicts = changedVerdicts(then, now);
  await db().transaction((tx) =>
    recordActivity(tx, {
      organisationId: revision.organisationId,
      actorId: member.userId,
      event: "revision.recomputed",
      subjectKind: "revision",
      subjectId: revision.id,
      detail: {
        planId: revision.planId,
        revision: revisionLetters(revision.ordinal),
        engineVersion: now.engineVersion,
        sameBytes,
        changedVerdicts: verdicts.length,
      },
    }),
  );
  return {
    engineVersion: now.engineVersion,
    engineVersionThen: contents.engineVersion,
    sameBytes,
    largestDifference: largestDifference(then, now),
    changedVerdicts: verdicts.map((change) => ({
      ...change,
      sensorName: names.get(change.sensorId) ?? change.sensorId,
    })),
  };
}
