import { calendarDay, concessionHasEnded, type DecisionInput, isFlagged } from "~/domain/decision";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { revisionLetters } from "~/domain/revision";
import { recordActivity } from "../activity/record";
import { requireFreshSignIn } from "../auth/fresh-sign-in";
import { db } from "../db/client";
import { insertDecision } from "../db/queries/decisions";
import { listRevisionPositions, type RevisionRow } from "../db/queries/revisions";
import type { SiteRow } from "../db/queries/sites";
import { lockUnderReview, requireOtherEyes, revisionPage } from "./open-revision";

const refuse = (path: string, message: string) =>
  new Refusal("input.refused", message, { faults: [{ path, message }] });

/**
 * Decides on a flagged position of a revision under review; a later decision on it replaces this one, and both are kept.
 * @param authenticatedAt when the auditor last proved who they are: a concession needs a fresh sign-in
 * @throws Refusal sign-in.too-old, permission.own-edit, state.conflict, input.refused
 */
export async function decide(
  member: Member,
  site: Pick<SiteRow, "timeZone">,
  revision: RevisionRow,
  input: DecisionInput,
  authenticatedAt: Date | null,
): Promise<{ ordinal: number }> {
  if (input.kind === "concession") requireFreshSignIn(authenticatedAt, revisionPage(revision));
  const expiresOn = input.kind === "concession" ? (input.expiresOn ?? null) : null;
  const decidedAt = new Date();
  if (expiresOn !== null && concessionHasEnded(expiresOn, calendarDay(decidedAt, site.timeZone)))
    throw refuse("expiresOn", "The concession would have ended already. Choose a later day, or none.");
  return db().transaction(async (tx) => {
    await lockUnderReview(tx, revision);
    await requireOtherEyes(tx, member, revision);
    const positions = await listRevisionPositions(tx, [revision.id]);
    const position = positions.find(({ sensorId }) => sensorId === input.sensorId);
    if (position === undefined)
      throw refuse("sensorId", "This revision has no such position. Reload the page.");
    if (!isFlagged(position.verdict))
      throw refuse("sensorId", "This position is within its budget and is released with the revision.");
    const ordinal = await insertDecision(tx, {
      revisionId: revision.id,
      sensorId: input.sensorId,
      kind: input.kind,
      reason: input.reason,
      expiresOn,
      moveTo: input.kind === "not-released" && input.moveTo !== "" ? input.moveTo : null,
      decidedBy: member.userId,
      decidedAt,
    });
    await recordActivity(tx, {
      organisationId: revision.organisationId,
      actorId: member.userId,
      event: "revision.decided",
      subjectKind: "revision",
      subjectId: revision.id,
      detail: {
        planId: revision.planId,
        revision: revisionLetters(revision.ordinal),
        sensorId: input.sensorId,
        decision: input.kind,
        ...(expiresOn !== null && { expiresOn }),
      },
    });
    return { ordinal };
  });
}
