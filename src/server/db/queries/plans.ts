import { and, eq, isNull } from "drizzle-orm";
import type { Queryable } from "../client";
import { plans } from "../schema/plans";

export type PlanRow = typeof plans.$inferSelect;

export async function findPlan(db: Queryable, organisationId: string, planId: string) {
  const [row] = await db
    .select()
    .from(plans)
    .where(and(eq(plans.organisationId, organisationId), eq(plans.id, planId), isNull(plans.archivedAt)));
  return row;
}

export async function insertPlan(db: Queryable, row: typeof plans.$inferInsert): Promise<void> {
  await db.insert(plans).values(row);
}

export async function renamePlan(
  db: Queryable,
  organisationId: string,
  planId: string,
  name: string,
): Promise<void> {
  await db
    .update(plans)
    .set({ name })
    .where(and(eq(plans.organisationId, organisationId), eq(plans.id, planId)));
}
