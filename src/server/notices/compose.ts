import { z } from "zod";
import { Refusal } from "~/domain/errors";
import { coveringTextSchema, type NoticeState, type Recipient, recipientsSchema } from "~/domain/notice";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import {
  insertNotice,
  listNotices,
  lockNotice,
  nextNoticeVersion,
  type NoticeRow,
  replaceRecipients,
  updateNotice,
} from "../db/queries/notices";
import type { PlanRow } from "../db/queries/plans";
import { lockScreening } from "../db/queries/screenings";

export const newNoticeInput = z.strictObject({
  screeningId: z.uuid(),
  coveringText: coveringTextSchema.default(""),
  recipients: recipientsSchema.default([]),
});

export const noticeChangeInput = z.strictObject({
  coveringText: coveringTextSchema.optional(),
  recipients: recipientsSchema.optional(),
});

const address = (plan: PlanRow, id: string) => ({ id, url: `/plans/${plan.id}/notices/${id}` });

/**
 * Begins the next version of a screening's notice. A screening has one draft at a time: asking for one with nothing in
 * it leads to the draft that is there.
 * @throws Refusal not-found; state.conflict where there is a draft and this one would say something
 */
export async function composeNotice(
  member: Member,
  plan: PlanRow,
  { screeningId, coveringText, recipients }: z.output<typeof newNoticeInput>,
): Promise<{ id: string; url: string; isNew: boolean }> {
  const { organisationId } = plan;
  return db().transaction(async (tx) => {
    if ((await lockScreening(tx, organisationId, plan.id, screeningId)) === undefined)
      throw new Refusal("not-found", "There is no such screening of this plan. Screen the plan first.");
    const drafts = await listNotices(tx, organisationId, screeningId);
    const draft = drafts.find(({ state }) => state === "draft");
    if (draft !== undefined) {
      if (coveringText === "" && recipients.length === 0) return { ...address(plan, draft.id), isNew: false };
      throw new Refusal(
        "state.conflict",
        `Version ${String(draft.version)} of this notice is still a draft. Open it and finish it first.`,
        { detail: address(plan, draft.id) },
      );
    }
    const id = crypto.randomUUID();
    const version = await nextNoticeVersion(tx, organisationId, screeningId, "screening");
    await insertNotice(tx, {
      id,
      organisationId,
      screeningId,
      kind: "screening",
      version,
      state: "draft" satisfies NoticeState,
      coveringText,
      createdBy: member.userId,
      createdAt: new Date(),
    });
    await replaceRecipients(tx, id, recipients);
    await recordActivity(tx, {
      organisationId,
      actorId: member.userId,
      event: "notice.composed",
      subjectKind: "notice",
      subjectId: id,
      detail: { screeningId, version },
    });
    return { ...address(plan, id), isNew: true };
  });
}

/** Changes a draft. @throws Refusal state.conflict once the notice has been issued */
export async function changeNotice(
  notice: NoticeRow,
  { coveringText, recipients }: { coveringText?: string | undefined; recipients?: Recipient[] | undefined },
): Promise<void> {
  await db().transaction(async (tx) => {
    await lockDraft(tx, notice);
    if (coveringText !== undefined)
      await updateNotice(tx, notice.organisationId, notice.id, { coveringText });
    if (recipients !== undefined) await replaceRecipients(tx, notice.id, recipients);
  });
}

/** The draft as it now is, held until the transaction ends. @throws Refusal state.conflict */
export async function lockDraft(tx: Queryable, notice: NoticeRow): Promise<NoticeRow> {
  const present = await lockNotice(tx, notice.organisationId, notice.id);
  if (present?.state === "draft") return present;
  throw new Refusal(
    "state.conflict",
    "This notice has been issued and stands as it was sent. Write a new version from the screening's page.",
  );
}
