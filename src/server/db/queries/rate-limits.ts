import { and, eq, lt, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { rateLimits } from "../schema/people";

/**
 * Counts one attempt.
 * @returns its ordinal in the window; no two attempts get the same unless one is taken back
 */
export async function countAttempt(db: Queryable, bucket: string, windowStartedAt: Date): Promise<number> {
  const [result] = await db
    .insert(rateLimits)
    .values({ bucket, windowStartedAt, attempts: 1 })
    .onDuplicateKeyUpdate({ set: { attempts: sql`last_insert_id(${rateLimits.attempts} + 1)` } });
  // The table makes no ids: 0 says that the row is new, anything else is what the update handed back.
  return result.insertId === 0 ? 1 : result.insertId;
}

export async function takeAttemptBack(db: Queryable, bucket: string, windowStartedAt: Date): Promise<void> {
  await db
    .update(rateLimits)
    .set({ attempts: sql`${rateLimits.attempts} - 1` })
    .where(and(eq(rateLimits.bucket, bucket), eq(rateLimits.windowStartedAt, windowStartedAt)));
}

export async function attemptsIn(db: Queryable, bucket: string, windowStartedAt: Date): Promise<number> {
  const [row] = await db
    .select({ attempts: rateLimits.attempts })
    .from(rateLimits)
    .where(and(eq(rateLimits.bucket, bucket), eq(rateLimits.windowStartedAt, windowStartedAt)));
  return row?.attempts ?? 0;
}

export async function deleteWindowsBefore(db: Queryable, before: Date): Promise<void> {
  await db.delete(rateLimits).where(lt(rateLimits.windowStartedAt, before));
}
