import { and, eq, gt, lt, ne } from "drizzle-orm";
import type { Queryable } from "../client";
import { sessions, users } from "../schema/people";

export type SessionRow = typeof sessions.$inferSelect;

export async function insertSession(db: Queryable, row: SessionRow): Promise<void> {
  await db.insert(sessions).values(row);
}

/** A session with its person, whether or not it has ended. */
export async function findSession(db: Queryable, sessionId: string) {
  const [row] = await db
    .select({
      session: sessions,
      person: {
        id: users.id,
        organisationId: users.organisationId,
        name: users.name,
        email: users.email,
        removedAt: users.removedAt,
      },
    })
    .from(sessions)
    .innerJoin(users, eq(users.id, sessions.userId))
    .where(eq(sessions.id, sessionId));
  return row;
}

export async function touchSession(db: Queryable, sessionId: string, now: Date): Promise<void> {
  await db
    .update(sessions)
    .set({ lastSeenAt: now })
    .where(and(eq(sessions.id, sessionId), lt(sessions.lastSeenAt, now)));
}

/** Gives a session a new id. @returns false when it is not there any more */
export async function renameSession(db: Queryable, sessionId: string, newId: string): Promise<boolean> {
  const [result] = await db.update(sessions).set({ id: newId }).where(eq(sessions.id, sessionId));
  return result.affectedRows === 1;
}

/** The sessions of a person that `seenAfter` and `now` leave alive, the latest used first. */
export async function listSessions(db: Queryable, userId: string, seenAfter: Date, now: Date) {
  const rows = await db
    .select({ id: sessions.id, createdAt: sessions.createdAt, lastSeenAt: sessions.lastSeenAt })
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, now), gt(sessions.lastSeenAt, seenAfter)));
  return rows.sort((a, b) => b.lastSeenAt.getTime() - a.lastSeenAt.getTime());
}

export async function deleteSession(db: Queryable, sessionId: string): Promise<boolean> {
  const [result] = await db.delete(sessions).where(eq(sessions.id, sessionId));
  return result.affectedRows === 1;
}

/** @returns how many there were */
export async function deleteSessionsOf(db: Queryable, userId: string, exceptId?: string): Promise<number> {
  const [result] = await db
    .delete(sessions)
    .where(and(eq(sessions.userId, userId), exceptId === undefined ? undefined : ne(sessions.id, exceptId)));
  return result.affectedRows;
}

export async function deleteExpiredSessions(db: Queryable, now: Date): Promise<void> {
  await db.delete(sessions).where(lt(sessions.expiresAt, now));
}
