import { and, eq, isNull } from "drizzle-orm";
import type { Queryable } from "../client";
import { plans } from "../schema/plans";

export async function findPlan(db: Queryable, organisationId: string, planId: string) {
  const [row] = await db
    .select()
    .from(plans)
    .where(and(eq(plans.organisationId, organisationId), eq(plans.id, planId), isNull(plans.archivedAt)));
  return row;
}
