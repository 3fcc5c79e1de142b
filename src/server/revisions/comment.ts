import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { requiredText } from "~/domain/plain-text";
import { revisionLetters } from "~/domain/revision";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import type { PlanRow } from "../db/queries/plans";
import {
  insertRevisionComment,
  listRevisionEditors,
  listRevisionPositions,
  lockRevision,
  type RevisionRow,
} from "../db/queries/revisions";
import { called, peopleBy, reviewersOf, tell } from "./tell";

export const commentInput = z.strictObject({
  sensorId: z.string().min(1).max(100),
  text: requiredText("The comment", "Write the comment first."),
});

/**
 * Says something about a position. The submitter and the auditors who have taken part are told by e-mail, all auditors
 * who may as long as none has; the author is not.
 * @throws Refusal input.refused; state.conflict once the revision is superseded
 */
export async function comment(
  member: Member,
  plan: PlanRow,
  revision: RevisionRow,
  { sensorId, text }: z.output<typeof commentInput>,
): Promise<{ id: string }> {
  const id = crypto.randomUUID();
  await db().transaction(async (tx) => {
    const present = await lockRevision(tx, revision.organisationId, revision.id);
    if (present === undefined || present.state === "superseded")
      throw new Refusal(
        "state.conflict",
        "This revision is superseded. Comment on the revision that took its place.",
      );
    const positions = await listRevisionPositions(tx, [revision.id]);
    const position = positions.find((one) => one.sensorId === sensorId);
    if (position === undefined) {
      const message = "This revision has no such position. Reload the page.";
      throw new Refusal("input.refused", message, { faults: [{ path: "sensorId", message }] });
    }
    const editors = await listRevisionEditors(tx, [revision.id]);
    const reviewers = await reviewersOf(tx, revision, editors);
    await insertRevisionComment(tx, {
      id,
      revisionId: revision.id,
      sensorId,
      text,
      authorId: member.userId,
      writtenAt: new Date(),
    });
    const others = [revision.submittedBy, ...reviewers].filter((userId) => userId !== member.userId);
    await tell(tx, revision, "comment", await peopleBy(tx, revision.organisationId, others), {
      subject: `Comment on ${position.sensorName}: ${called(plan, revision)}`,
      sentences: [`${member.name} wrote about ${position.sensorName} in ${called(plan, revision)}.`],
      quoted: { heading: "Comment", text },
    });
    await recordActivity(tx, {
      organisationId: revision.organisationId,
      actorId: member.userId,
      event: "revision.commented",
      subjectKind: "revision",
      subjectId: revision.id,
      detail: { planId: revision.planId, revision: revisionLetters(revision.ordinal), sensorId },
    });
  });
  return { id };
}
