import { and, asc, desc, eq, isNotNull, isNull } from "drizzle-orm";
import type { Queryable } from "../client";
import { plans, sites } from "../schema/plans";

export type PlanRow = typeof plans.$inferSelect;

export async function findPlan(db: Queryable, organisationId: string, planId: string) {
  const [row] = await db
    .select()
    .from(plans)
    .where(and(eq(plans.organisationId, organisationId), eq(plans.id, planId), isNull(plans.archivedAt)));
  return row;
}

/** A plan that was put away. */
export async function findArchivedPlan(db: Queryable, organisationId: string, planId: string) {
  const [row] = await db
    .select()
    .from(plans)
    .where(and(eq(plans.organisationId, organisationId), eq(plans.id, planId), isNotNull(plans.archivedAt)));
  return row;
}

export async function listArchivedPlans(db: Queryable, organisationId: string) {
  return db
    .select({ id: plans.id, name: plans.name, siteName: sites.name, archivedAt: plans.archivedAt })
    .from(plans)
    .innerJoin(sites, eq(sites.id, plans.siteId))
    .where(and(eq(plans.organisationId, organisationId), isNotNull(plans.archivedAt)))
    .orderBy(desc(plans.archivedAt), asc(plans.id));
}

/** @returns false when it is so already */
export async function archivePlanRow(
  tx: Queryable,
  organisationId: string,
  planId: string,
  archivedAt: Date | null,
): Promise<boolean> {
  const [{ affectedRows }] = await tx
    .update(plans)
    .set({ archivedAt })
    .where(
      and(
        eq(plans.organisationId, organisationId),
        eq(plans.id, planId),
        archivedAt === null ? isNotNull(plans.archivedAt) : isNull(plans.archivedAt),
      ),
    );
  return affectedRows === 1;
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
