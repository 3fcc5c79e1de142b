import { z } from "zod";
import type { Member } from "~/domain/permissions";
import { requiredText } from "~/domain/plain-text";
import { revisionLetters } from "~/domain/revision";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import type { PlanRow } from "../db/queries/plans";
import { type RevisionRow, updateRevision } from "../db/queries/revisions";
import { lockUnderReview } from "./open-revision";
import { called, peopleBy, tell } from "./tell";

export const returnInput = z.strictObject({
  reasons: requiredText("The reasons", "Say what has to change before this can be released."),
});

/** Gives a revision under review back to the planner. @throws Refusal state.conflict */
export async function returnRevision(
  member: Member,
  plan: PlanRow,
  revision: RevisionRow,
  { reasons }: z.output<typeof returnInput>,
): Promise<{ returnedAt: Date }> {
  return db().transaction(async (tx) => {
    await lockUnderReview(tx, revision);
    const returnedAt = new Date();
    await updateRevision(tx, revision.organisationId, revision.id, {
      state: "returned",
      underReviewOf: null,
      closedBy: member.userId,
      closedAt: returnedAt,
      returnReasons: reasons,
    });
    const planner = await peopleBy(tx, revision.organisationId, [revision.submittedBy]);
    await tell(tx, revision, "returned", planner, {
      subject: `Returned: ${called(plan, revision)}`,
      sentences: [
        `${member.name} has returned ${called(plan, revision)}. Change the plan and submit it as the next revision.`,
      ],
      quoted: { heading: "Reasons", text: reasons },
    });
    await recordActivity(tx, {
      organisationId: revision.organisationId,
      actorId: member.userId,
      event: "revision.returned",
      subjectKind: "revision",
      subjectId: revision.id,
      detail: { planId: plan.id, revision: revisionLetters(revision.ordinal) },
    });
    return { returnedAt };
  });
}
