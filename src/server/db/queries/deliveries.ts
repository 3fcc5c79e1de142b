import { and, asc, desc, eq, inArray, isNull, lt, lte, or } from "drizzle-orm";
import type { DeliveryState } from "~/domain/delivery";
import type { Queryable } from "../client";
import { deliveries, noticeRecipients, notices } from "../schema/notices";
import { users } from "../schema/people";
import { revisionMails } from "../schema/revisions";

export type DeliveryRow = typeof deliveries.$inferSelect;

/** A claim on a row: `attempts` counts up with every claim, so a claim that ran out can't be mistaken for a later one. */
export type Claim = Pick<DeliveryRow, "id" | "attempts">;

const rowsPerInsert = 500;

export async function insertDeliveries(
  db: Queryable,
  rows: readonly (typeof deliveries.$inferInsert)[],
): Promise<void> {
  for (let start = 0; start < rows.length; start += rowsPerInsert)
    await db.insert(deliveries).values(rows.slice(start, start + rowsPerInsert));
}

/**
 * Claims the message that has been due longest, whichever organisation it belongs to; rows that another worker is just
 * claiming are passed over. Call it in a transaction of its own and commit before sending.
 */
export async function claimDueDelivery(
  db: Queryable,
  now: Date,
  claimedUntil: Date,
): Promise<DeliveryRow | undefined> {
  const [row] = await db
    .select()
    .from(deliveries)
    .where(
      and(
        eq(deliveries.state, "waiting"),
        lte(deliveries.nextAttemptAt, now),
        or(isNull(deliveries.claimedUntil), lte(deliveries.claimedUntil, now)),
      ),
    )
    .orderBy(asc(deliveries.nextAttemptAt), asc(deliveries.id))
    .limit(1)
    .for("update", { skipLocked: true });
  if (row === undefined) return undefined;
  const claim = { claimedUntil, attempts: row.attempts + 1 };
  await db.update(deliveries).set(claim).where(eq(deliveries.id, row.id));
  return { ...row, ...claim };
}

/** @returns false, and nothing is changed, when the claim ran out and somebody else has the row. */
export async function settleDelivery(
  db: Queryable,
  claim: Claim,
  outcome: { state: DeliveryState; lastAnswer: string; nextAttemptAt?: Date; sentAt?: Date },
): Promise<boolean> {
  const [{ affectedRows }] = await db
    .update(deliveries)
    .set({ ...outcome, claimedUntil: null })
    .where(
      and(
        eq(deliveries.id, claim.id),
        eq(deliveries.attempts, claim.attempts),
        eq(deliveries.state, "waiting"),
      ),
    );
  return affectedRows === 1;
}

const shown = {
  id: deliveries.id,
  kind: deliveries.kind,
  state: deliveries.state,
  attempts: deliveries.attempts,
  nextAttemptAt: deliveries.nextAttemptAt,
  sentAt: deliveries.sentAt,
  lastAnswer: deliveries.lastAnswer,
  createdAt: deliveries.createdAt,
};

/** A notice's messages by recipient's name. */
export async function listNoticeDeliveries(db: Queryable, organisationId: string, noticeId: string) {
  return db
    .select({ ...shown, recipientName: noticeRecipients.name, email: noticeRecipients.email })
    .from(deliveries)
    .innerJoin(noticeRecipients, eq(noticeRecipients.id, deliveries.recipientId))
    .where(and(eq(deliveries.organisationId, organisationId), eq(noticeRecipients.noticeId, noticeId)))
    .orderBy(asc(noticeRecipients.name), asc(noticeRecipients.email));
}

/** An organisation's messages, the newest first; the address of a sign-in message is its person's. */
export async function listDeliveries(db: Queryable, organisationId: string, limit: number) {
  const rows = await db
    .select({
      ...shown,
      noticeId: noticeRecipients.noticeId,
      screeningId: notices.screeningId,
      recipientName: noticeRecipients.name,
      recipientEmail: noticeRecipients.email,
      userName: users.name,
      userEmail: users.email,
      mailName: revisionMails.toName,
      mailEmail: revisionMails.toEmail,
    })
    .from(deliveries)
    .leftJoin(noticeRecipients, eq(noticeRecipients.id, deliveries.recipientId))
    .leftJoin(notices, eq(notices.id, noticeRecipients.noticeId))
    .leftJoin(users, eq(users.id, deliveries.userId))
    .leftJoin(revisionMails, eq(revisionMails.id, deliveries.revisionMailId))
    .where(eq(deliveries.organisationId, organisationId))
    .orderBy(desc(deliveries.createdAt), desc(deliveries.id))
    .limit(limit);
  return rows.map(({ recipientEmail, userName, userEmail, mailName, mailEmail, recipientName, ...row }) => ({
    ...row,
    recipientName: recipientName ?? userName ?? mailName ?? "",
    email: recipientEmail ?? userEmail ?? mailEmail ?? "",
  }));
}

/** Forgets sign-in messages that are done with; a notice's messages stay with the notice. */
export async function deleteSettledSignInDeliveries(db: Queryable, createdBefore: Date): Promise<void> {
  await db
    .delete(deliveries)
    .where(
      and(
        eq(deliveries.kind, "sign-in-link"),
        inArray(deliveries.state, ["sent", "failed"]),
        lt(deliveries.createdAt, createdBefore),
      ),
    );
}
