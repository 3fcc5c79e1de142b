import { and, asc, desc, eq, inArray, isNull, lt, lte, or, sql } from "drizzle-orm";
import type { DeliveryKind, DeliveryState } from "~/domain/delivery";
import type { Queryable } from "../client";
import { invitations } from "../schema/invitations";
import { deliveries, noticeRecipients, notices } from "../schema/notices";
import { users } from "../schema/people";
import { screenings } from "../schema/plans";
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

export async function findDelivery(db: Queryable, organisationId: string, deliveryId: string) {
  const [row] = await db
    .select()
    .from(deliveries)
    .where(and(eq(deliveries.organisationId, organisationId), eq(deliveries.id, deliveryId)));
  return row;
}

/** As `findDelivery`; workers pass the row over until the end of the transaction. */
export async function lockDelivery(tx: Queryable, organisationId: string, deliveryId: string) {
  const [row] = await tx
    .select()
    .from(deliveries)
    .where(and(eq(deliveries.organisationId, organisationId), eq(deliveries.id, deliveryId)))
    .for("update");
  return row;
}

export async function updateDelivery(
  tx: Queryable,
  deliveryId: string,
  change: Partial<Pick<DeliveryRow, "state" | "nextAttemptAt" | "claimedUntil">>,
): Promise<void> {
  await tx.update(deliveries).set(change).where(eq(deliveries.id, deliveryId));
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

interface Looked {
  state?: DeliveryState | undefined;
  kind?: DeliveryKind | undefined;
  /** Part of the recipient's name or address. */
  to?: string | undefined;
}

/** An organisation's messages, the newest first; the address of a sign-in message is its person's. */
export async function listDeliveries(
  db: Queryable,
  organisationId: string,
  limit: number,
  { state, kind, to }: Looked = {},
) {
  const recipientName = sql<string>`coalesce(${noticeRecipients.name}, ${users.name}, ${invitations.name}, ${revisionMails.toName}, '')`;
  const email = sql<string>`coalesce(${noticeRecipients.email}, ${users.email}, ${invitations.email}, ${revisionMails.toEmail}, '')`;
  return db
    .select({
      ...shown,
      noticeId: noticeRecipients.noticeId,
      screeningId: notices.screeningId,
      planId: screenings.planId,
      recipientName,
      email,
    })
    .from(deliveries)
    .leftJoin(noticeRecipients, eq(noticeRecipients.id, deliveries.recipientId))
    .leftJoin(notices, eq(notices.id, noticeRecipients.noticeId))
    .leftJoin(screenings, eq(screenings.id, notices.screeningId))
    .leftJoin(users, eq(users.id, deliveries.userId))
    .leftJoin(invitations, eq(invitations.id, deliveries.invitationId))
    .leftJoin(revisionMails, eq(revisionMails.id, deliveries.revisionMailId))
    .where(
      and(
        eq(deliveries.organisationId, organisationId),
        state === undefined ? undefined : eq(deliveries.state, state),
        kind === undefined ? undefined : eq(deliveries.kind, kind),
        to === undefined
          ? undefined
          : or(sql`instr(${recipientName}, ${to}) > 0`, sql`instr(${email}, ${to}) > 0`),
      ),
    )
    .orderBy(desc(deliveries.createdAt), desc(deliveries.id))
    .limit(limit);
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
