import { and, asc, desc, eq, getTableColumns, gt, gte, isNull, lt } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import type { Queryable } from "../client";
import { activityHeads, activityLog, users } from "../schema/people";

export type ActivityRow = typeof activityLog.$inferInsert;

export async function insertActivity(db: Queryable, row: ActivityRow): Promise<void> {
  await db.insert(activityLog).values(row);
}

/** The newest line's place and hash; others who add a line wait for the end of the transaction. */
export async function lockHead(tx: Queryable, organisationId: string) {
  const [head] = await tx
    .select({ sequence: activityHeads.sequence, hash: activityHeads.hash })
    .from(activityHeads)
    .where(eq(activityHeads.organisationId, organisationId))
    .for("update");
  if (head === undefined) throw new Error("The organisation's activity log has no head.");
  return head;
}

export async function moveHead(
  tx: Queryable,
  organisationId: string,
  head: { sequence: number; hash: string },
): Promise<void> {
  await tx.update(activityHeads).set(head).where(eq(activityHeads.organisationId, organisationId));
}

export async function insertHead(tx: Queryable, organisationId: string, hash: string): Promise<void> {
  await tx.insert(activityHeads).values({ organisationId, sequence: 0, hash });
}

export async function findHead(db: Queryable, organisationId: string) {
  const [head] = await db
    .select({ sequence: activityHeads.sequence, hash: activityHeads.hash })
    .from(activityHeads)
    .where(eq(activityHeads.organisationId, organisationId));
  return head;
}

/** What lines are looked for; whatever is left out matches all. */
export interface ActivityFilter {
  /** Null for what the service itself did. */
  actorId?: string | null | undefined;
  event?: string | undefined;
  subjectKind?: string | undefined;
  subjectId?: string | undefined;
  /** From this instant on. */
  from?: Date | undefined;
  /** Before this instant. */
  until?: Date | undefined;
}

const matching = (organisationId: string, filter: ActivityFilter) =>
  and(
    eq(activityLog.organisationId, organisationId),
    filter.actorId === undefined
      ? undefined
      : filter.actorId === null
        ? isNull(activityLog.actorId)
        : eq(activityLog.actorId, filter.actorId),
    filter.event === undefined ? undefined : eq(activityLog.event, filter.event),
    filter.subjectKind === undefined ? undefined : eq(activityLog.subjectKind, filter.subjectKind),
    filter.subjectId === undefined ? undefined : eq(activityLog.subjectId, filter.subjectId),
    filter.from === undefined ? undefined : gte(activityLog.at, filter.from),
    filter.until === undefined ? undefined : lt(activityLog.at, filter.until),
  );

const subjects = alias(users, "subjects");

/** The newest first; lines from `before` on are left out, to page on. */
export async function listActivity(
  db: Queryable,
  organisationId: string,
  limit: number,
  filter: ActivityFilter = {},
  before?: number,
) {
  return db
    .select({
      id: activityLog.id,
      sequence: activityLog.sequence,
      at: activityLog.at,
      actorId: activityLog.actorId,
      event: activityLog.event,
      subjectKind: activityLog.subjectKind,
      subjectId: activityLog.subjectId,
      detail: activityLog.detail,
      previousHash: activityLog.previousHash,
      hash: activityLog.hash,
      actorName: users.name,
      /** Of the member whom the line is about. */
      subjectName: subjects.name,
    })
    .from(activityLog)
    .leftJoin(users, eq(users.id, activityLog.actorId))
    .leftJoin(subjects, and(eq(subjects.id, activityLog.subjectId), eq(activityLog.subjectKind, "member")))
    .where(
      and(
        matching(organisationId, filter),
        before === undefined ? undefined : lt(activityLog.sequence, before),
      ),
    )
    .orderBy(desc(activityLog.sequence))
    .limit(limit);
}

/** Lines that match, the oldest first, from after `sequence` on. */
export async function activityAfter(
  db: Queryable,
  organisationId: string,
  filter: ActivityFilter,
  sequence: number,
  limit: number,
) {
  return db
    .select({ ...getTableColumns(activityLog), actorName: users.name })
    .from(activityLog)
    .leftJoin(users, eq(users.id, activityLog.actorId))
    .where(and(matching(organisationId, filter), gt(activityLog.sequence, sequence)))
    .orderBy(asc(activityLog.sequence))
    .limit(limit);
}

/** Lines as they are stored, the oldest first, from after `sequence` on. */
export async function linesAfter(db: Queryable, organisationId: string, sequence: number, limit: number) {
  return db
    .select()
    .from(activityLog)
    .where(and(eq(activityLog.organisationId, organisationId), gt(activityLog.sequence, sequence)))
    .orderBy(asc(activityLog.sequence))
    .limit(limit);
}
