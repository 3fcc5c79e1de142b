import { and, eq, gt, isNull, lt } from "drizzle-orm";
import type { Queryable } from "../client";
import { pendingSignIns, signInLinks } from "../schema/people";

export type PendingSignIn = typeof pendingSignIns.$inferSelect;

export async function insertPendingSignIn(
  db: Queryable,
  row: typeof pendingSignIns.$inferInsert,
): Promise<void> {
  await db.insert(pendingSignIns).values(row);
}

export async function findPendingSignIn(db: Queryable, id: string, now: Date) {
  const [row] = await db
    .select()
    .from(pendingSignIns)
    .where(and(eq(pendingSignIns.id, id), gt(pendingSignIns.expiresAt, now)));
  return row;
}

/** Uses a pending sign-in up. @returns false when somebody else has */
export async function deletePendingSignIn(db: Queryable, id: string): Promise<boolean> {
  const [result] = await db.delete(pendingSignIns).where(eq(pendingSignIns.id, id));
  return result.affectedRows === 1;
}

export async function deleteExpiredPendingSignIns(db: Queryable, now: Date): Promise<void> {
  await db.delete(pendingSignIns).where(lt(pendingSignIns.expiresAt, now));
}

export async function insertSignInLink(
  db: Queryable,
  row: { id: string; userId: string; createdAt: Date; expiresAt: Date },
): Promise<void> {
  await db.insert(signInLinks).values(row);
}

/** Marks a link as used, once. @returns false when it is unknown, expired or used */
export async function takeSignInLink(db: Queryable, id: string, now: Date): Promise<boolean> {
  const [result] = await db
    .update(signInLinks)
    .set({ usedAt: now })
    .where(and(eq(signInLinks.id, id), isNull(signInLinks.usedAt), gt(signInLinks.expiresAt, now)));
  return result.affectedRows === 1;
}

export async function findSignInLink(db: Queryable, id: string) {
  const [row] = await db.select().from(signInLinks).where(eq(signInLinks.id, id));
  return row;
}

export async function deleteExpiredSignInLinks(db: Queryable, now: Date): Promise<void> {
  await db.delete(signInLinks).where(lt(signInLinks.expiresAt, now));
}

export async function deleteSignInLinksOf(db: Queryable, userId: string): Promise<void> {
  await db.delete(signInLinks).where(eq(signInLinks.userId, userId));
}
