import { z } from "zod";
import { Refusal } from "~/domain/errors";
import { coveringTextSchema, type NoticeState, type Recipient, recipientsSchema } from "~/domain/notice";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import {
  insertNotice,
  listNotices,
  listRecipients,
  lockNotice,
  nextNoticeVersion,
  type NoticeRow,
  replaceRecipients,
  updateNotice,
} from "../db/queries/notices";
import type { PlanRow } from "../db/queries/plans";
import { lockScreening } from "../db/queries/screenings";
import { draftTagOf } from "./draft-tag";

export const newNoticeInput = z.strictObject({
  screeningId: z.uuid(),
  coveringText: coveringTextSchema.default(""),
  recipients: recipientsSchema.default([]),
});

export const noticeChangeInput = z.strictObject({
  /** Of the draft as the planner has it before them. */
  draftTag: z.string().max(64),
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

/**
 * Changes a draft that is still as it was when the planner opened it.
 * @returns the tag of what it says now
 * @throws Refusal state.conflict once the notice has been issued, or, with the draft as it is now in its detail, once
 * somebody else has changed it
 */
export async function changeNotice(
  notice: NoticeRow,
  { draftTag, ...change }: z.output<typeof noticeChangeInput>,
): Promise<{ draftTag: string }> {
  return db().transaction(async (tx) => {
    const draft = await lockDraft(tx, notice);
    const recipients = await recipientsOf(tx, notice);
    const after = {
      coveringText: change.coveringText ?? draft.coveringText,
      recipients: change.recipients ?? recipients,
    };
    const nextTag = draftTagOf(after.coveringText, after.recipients);
    const presentTag = draftTagOf(draft.coveringText, recipients);
    // A save whose answer was lost may be repeated.
    if (presentTag === nextTag) return { draftTag: nextTag };
    if (presentTag !== draftTag)
      throw new Refusal(
        "state.conflict",
        "Somebody else has changed this draft since you opened it. What you typed is still here: compare, and choose what stands.",
        { detail: { draftTag: presentTag, coveringText: draft.coveringText, recipients } },
      );
    if (change.coveringText !== undefined)
      await updateNotice(tx, notice.organisationId, notice.id, { coveringText: change.coveringText });
    if (change.recipients !== undefined) await replaceRecipients(tx, notice.id, change.recipients);
    return { draftTag: nextTag };
  });
}

async function recipientsOf(tx: Queryable, notice: NoticeRow): Promise<Recipient[]> {
  const rows = await listRecipients(tx, notice.organisationId, notice.id);
  return rows.map(({ name, email }) => ({ name, email }));
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
