import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { insertDeliveries } from "../db/queries/deliveries";
import { insertNoticeMessage, listRecipients, type NoticeRow, updateNotice } from "../db/queries/notices";
import type { PlanRow } from "../db/queries/plans";
import { newMessageId } from "../mail/message-id";
import { lockDraft } from "./compose";
import { composeMessage } from "./render";

/**
 * Issues a draft: fixes what it says, and puts one message for each recipient into the outbox.
 * @throws Refusal state.conflict when it has been issued already; input.refused without recipients
 */
export async function issueNotice(
  member: Member,
  plan: PlanRow,
  notice: NoticeRow,
): Promise<{ issuedAt: Date; recipients: number }> {
  const { organisationId } = plan;
  return db().transaction(async (tx) => {
    const draft = await lockDraft(tx, notice);
    const recipients = await listRecipients(tx, organisationId, notice.id);
    if (recipients.length === 0)
      throw new Refusal("input.refused", "This notice has nobody to go to. Add at least one recipient.", {
        faults: [
          { path: "recipients", message: "Choose somebody from the site's list, or type an address." },
        ],
      });
    const issuedAt = new Date();
    await insertNoticeMessage(tx, await composeMessage(tx, member, plan, draft));
    await updateNotice(tx, organisationId, notice.id, { state: "issued", issuedAt });
    await insertDeliveries(
      tx,
      recipients.map(({ id: recipientId }) => ({
        id: crypto.randomUUID(),
        organisationId,
        kind: "notice" as const,
        recipientId,
        messageId: newMessageId(),
        state: "waiting" as const,
        attempts: 0,
        nextAttemptAt: issuedAt,
        createdAt: issuedAt,
      })),
    );
    await recordActivity(tx, {
      organisationId,
      actorId: member.userId,
      event: "notice.issued",
      subjectKind: "notice",
      subjectId: notice.id,
      detail: { screeningId: notice.screeningId, version: draft.version, recipients: recipients.length },
    });
    return { issuedAt, recipients: recipients.length };
  });
}
