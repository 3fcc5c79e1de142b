import { and, asc, desc, eq, getTableColumns, max } from "drizzle-orm";
import type { NoticeKind, NoticeState, Recipient } from "~/domain/notice";
import type { Queryable } from "../client";
import { noticeMessages, noticeRecipients, notices } from "../schema/notices";
import { screenings } from "../schema/plans";

export type NoticeRow = typeof notices.$inferSelect;
export type NoticeMessageRow = typeof noticeMessages.$inferSelect;
export type RecipientRow = typeof noticeRecipients.$inferSelect;

export async function findNotice(db: Queryable, organisationId: string, planId: string, noticeId: string) {
  const [row] = await db
    .select(getTableColumns(notices))
    .from(notices)
    .innerJoin(screenings, eq(screenings.id, notices.screeningId))
    .where(
      and(
        eq(notices.organisationId, organisationId),
        eq(screenings.planId, planId),
        eq(notices.id, noticeId),
      ),
    );
  return row;
}

export async function findNoticeById(
  db: Queryable,
  organisationId: string,
  noticeId: string,
): Promise<NoticeRow | undefined> {
  const [row] = await db
    .select()
    .from(notices)
    .where(and(eq(notices.organisationId, organisationId), eq(notices.id, noticeId)));
  return row;
}

/** The notice, held against other transactions until this one ends. */
export async function lockNotice(
  db: Queryable,
  organisationId: string,
  noticeId: string,
): Promise<NoticeRow | undefined> {
  const [row] = await db
    .select()
    .from(notices)
    .where(and(eq(notices.organisationId, organisationId), eq(notices.id, noticeId)))
    .for("update");
  return row;
}

/** The notices of a screening, the newest first. */
export async function listNotices(db: Queryable, organisationId: string, screeningId: string) {
  return db
    .select({
      id: notices.id,
      version: notices.version,
      state: notices.state,
      createdAt: notices.createdAt,
      issuedAt: notices.issuedAt,
    })
    .from(notices)
    .where(and(eq(notices.organisationId, organisationId), eq(notices.screeningId, screeningId)))
    .orderBy(desc(notices.version));
}

/** Call it with the screening locked, so that two notices do not get the same number. */
export async function nextNoticeVersion(
  db: Queryable,
  organisationId: string,
  screeningId: string,
  kind: NoticeKind,
): Promise<number> {
  const [row] = await db
    .select({ version: max(notices.version) })
    .from(notices)
    .where(
      and(
        eq(notices.organisationId, organisationId),
        eq(notices.screeningId, screeningId),
        eq(notices.kind, kind),
      ),
    );
  return (row?.version ?? 0) + 1;
}

export async function insertNotice(db: Queryable, row: typeof notices.$inferInsert): Promise<void> {
  await db.insert(notices).values(row);
}

export async function updateNotice(
  db: Queryable,
  organisationId: string,
  noticeId: string,
  change: { coveringText?: string; state?: NoticeState; issuedAt?: Date },
): Promise<void> {
  await db
    .update(notices)
    .set(change)
    .where(and(eq(notices.organisationId, organisationId), eq(notices.id, noticeId)));
}

export async function listRecipients(db: Queryable, organisationId: string, noticeId: string) {
  return db
    .select(getTableColumns(noticeRecipients))
    .from(noticeRecipients)
    .innerJoin(notices, eq(notices.id, noticeRecipients.noticeId))
    .where(and(eq(notices.organisationId, organisationId), eq(noticeRecipients.noticeId, noticeId)))
    .orderBy(asc(noticeRecipients.name), asc(noticeRecipients.email));
}

/** Call it with the notice locked: it belongs to a draft and to the caller's organisation. */
export async function replaceRecipients(
  db: Queryable,
  noticeId: string,
  recipients: readonly Recipient[],
): Promise<void> {
  await db.delete(noticeRecipients).where(eq(noticeRecipients.noticeId, noticeId));
  if (recipients.length > 0)
    await db
      .insert(noticeRecipients)
      .values(recipients.map((recipient) => ({ ...recipient, id: crypto.randomUUID(), noticeId })));
}

export async function insertNoticeMessage(db: Queryable, row: NoticeMessageRow): Promise<void> {
  await db.insert(noticeMessages).values(row);
}

/** What an issued notice says. */
export async function findNoticeMessage(
  db: Queryable,
  organisationId: string,
  noticeId: string,
): Promise<NoticeMessageRow | undefined> {
  const [row] = await db
    .select(getTableColumns(noticeMessages))
    .from(noticeMessages)
    .innerJoin(notices, eq(notices.id, noticeMessages.noticeId))
    .where(and(eq(notices.organisationId, organisationId), eq(noticeMessages.noticeId, noticeId)));
  return row;
}

/** A message's recipient with the notice that it belongs to. */
export async function findRecipient(db: Queryable, organisationId: string, recipientId: string) {
  const [row] = await db
    .select(getTableColumns(noticeRecipients))
    .from(noticeRecipients)
    .innerJoin(notices, eq(notices.id, noticeRecipients.noticeId))
    .where(and(eq(notices.organisationId, organisationId), eq(noticeRecipients.id, recipientId)));
  return row;
}
