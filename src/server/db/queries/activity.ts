import { and, desc, eq, lt } from "drizzle-orm";
import type { Queryable } from "../client";
import { activityLog, users } from "../schema/people";

export type ActivityRow = typeof activityLog.$inferInsert;

export async function insertActivity(db: Queryable, row: ActivityRow): Promise<void> {
  await db.insert(activityLog).values(row);
}

/** The newest first; `before` pages on. */
export async function listActivity(db: Queryable, organisationId: string, limit: number, before?: Date) {
  return db
    .select({
      id: activityLog.id,
      at: activityLog.at,
      event: activityLog.event,
      subjectKind: activityLog.subjectKind,
      subjectId: activityLog.subjectId,
      detail: activityLog.detail,
      actorName: users.name,
    })
    .from(activityLog)
    .leftJoin(users, eq(users.id, activityLog.actorId))
    .where(
      and(
        eq(activityLog.organisationId, organisationId),
        before === undefined ? undefined : lt(activityLog.at, before),
      ),
    )
    .orderBy(desc(activityLog.at), desc(activityLog.id))
    .limit(limit);
}
