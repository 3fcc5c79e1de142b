import { z } from "zod";
import { type Disposition, dispositionWords } from "~/domain/decision";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { isOwnName, releaseSentence, revisionLetters } from "~/domain/revision";
import { recordActivity } from "../activity/record";
import { requireFreshSignIn } from "../auth/fresh-sign-in";
import { db, type Queryable } from "../db/client";
import type { PlanRow } from "../db/queries/plans";
import {
  forgetPlanEditors,
  listReleasedRevisions,
  lockWorkingCopy,
  type RevisionRow,
  updateRevision,
} from "../db/queries/revisions";
import type { SiteRow } from "../db/queries/sites";
import { contentsOf, lockUnderReview, requireOtherEyes, revisionPage } from "./open-revision";
import { type DecidedPosition, decidedPositions } from "./positions";
import { called, peopleBy, tell } from "./tell";

export const releaseInput = z.strictObject({
  /** The sentence that the auditor read; it has to be the one that now holds. */
  sentence: z.string().max(2000),
  /** Their name as they typed it under the sentence. */
  name: z.string().trim().min(1, "Type your name under the sentence.").max(200),
});

/**
 * Releases a revision whose flagged positions are all decided; the plan's last released one is superseded.
 * @throws Refusal sign-in.too-old, permission.own-edit, state.conflict, input.refused where the name is not the member's
 */
export async function releaseRevision(
  member: Member,
  plan: PlanRow,
  site: Pick<SiteRow, "name">,
  revision: RevisionRow,
  input: z.output<typeof releaseInput>,
  authenticatedAt: Date | null,
): Promise<{ releasedAt: Date }> {
  requireFreshSignIn(authenticatedAt, revisionPage(revision));
  if (!isOwnName(input.name, member.name)) {
    const message = `Type your name as it stands in your account: ${member.name}.`;
    throw new Refusal("input.refused", message, { faults: [{ path: "name", message }] });
  }
  return db().transaction(async (tx) => {
    // In the order of a submission, so that the two never wait for each other.
    await lockWorkingCopy(tx, revision.organisationId, plan.id);
    await lockUnderReview(tx, revision);
    await requireOtherEyes(tx, member, revision);
    const positions = await decidedPositions(tx, revision.id);
    const sentence = sentenceFor(plan, site, revision, positions);
    if (sentence !== input.sentence)
      throw new Refusal(
        "state.conflict",
        "The decisions have changed since you opened the page. Reload it and read the sentence again.",
      );
    const releasedAt = new Date();
    await supersedeOthers(tx, member, revision, releasedAt);
    await updateRevision(tx, revision.organisationId, revision.id, {
      state: "released",
      underReviewOf: null,
      closedBy: member.userId,
      closedAt: releasedAt,
      signedSentence: sentence,
      signedName: input.name,
    });
    const { documentVersion } = await contentsOf(tx, revision);
    await forgetPlanEditors(tx, plan.id, documentVersion);
    await tell(
      tx,
      revision,
      "released",
      await peopleBy(tx, revision.organisationId, [revision.submittedBy]),
      {
        subject: `Released: ${called(plan, revision)}`,
        sentences: [`${member.name} has released ${called(plan, revision)}, ${site.name}.`],
        facts: positions.map(({ sensorName, disposition }) => [sensorName, dispositionWords[disposition]]),
      },
    );
    await recordActivity(tx, {
      organisationId: revision.organisationId,
      actorId: member.userId,
      event: "revision.released",
      subjectKind: "revision",
      subjectId: revision.id,
      detail: { planId: plan.id, revision: revisionLetters(revision.ordinal), ...counts(positions) },
    });
    return { releasedAt };
  });
}

/** @throws Refusal state.conflict as long as a flagged position waits */
function sentenceFor(
  plan: Pick<PlanRow, "name">,
  site: Pick<SiteRow, "name">,
  revision: RevisionRow,
  positions: readonly DecidedPosition[],
): string {
  const waiting = positions.filter(({ disposition }) => disposition === "waiting");
  if (waiting.length > 0)
    throw new Refusal(
      "state.conflict",
      `Decide first on ${waiting.map(({ sensorName }) => sensorName).join(", ")}: a revision is released when every flagged position has its decision.`,
    );
  return releaseSentence({
    ordinal: revision.ordinal,
    planName: plan.name,
    siteName: site.name,
    dispositions: positions.map(({ disposition }) => disposition),
  });
}

async function supersedeOthers(
  tx: Queryable,
  member: Member,
  revision: RevisionRow,
  supersededAt: Date,
): Promise<void> {
  const { organisationId, planId } = revision;
  for (const earlier of await listReleasedRevisions(tx, organisationId, planId)) {
    await updateRevision(tx, organisationId, earlier.id, { state: "superseded", supersededAt });
    await recordActivity(tx, {
      organisationId,
      actorId: member.userId,
      event: "revision.superseded",
      subjectKind: "revision",
      subjectId: earlier.id,
      detail: {
        planId,
        from: revisionLetters(earlier.ordinal),
        to: revisionLetters(revision.ordinal),
      },
    });
  }
}

function counts(positions: readonly DecidedPosition[]): Partial<Record<Disposition, number>> {
  const found: Partial<Record<Disposition, number>> = {};
  for (const { disposition } of positions) found[disposition] = (found[disposition] ?? 0) + 1;
  return found;
}
