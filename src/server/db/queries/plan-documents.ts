import { and, eq, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { users } from "../schema/people";
import { planDocuments, plans } from "../schema/plans";

export interface SavedDocument {
  planId: string;
  /** The document's JSON, as the schema writes it. */
  document: string;
  savedBy: string;
  savedAt: Date;
}

/** A plan's working copy with the name of whoever saved it last. */
export async function findPlanDocument(db: Queryable, organisationId: string, planId: string) {
  const [row] = await db
    .select({
      version: planDocuments.version,
      document: planDocuments.document,
      savedAt: planDocuments.savedAt,
      savedByName: users.name,
    })
    .from(planDocuments)
    .innerJoin(plans, eq(plans.id, planDocuments.planId))
    .leftJoin(users, eq(users.id, planDocuments.savedBy))
    .where(and(eq(plans.organisationId, organisationId), eq(planDocuments.planId, planId)));
  return row;
}

/** The first version of a working copy. */
export async function insertPlanDocument(db: Queryable, saved: SavedDocument): Promise<void> {
  await db.insert(planDocuments).values({ ...saved, version: 1 });
}

/**
 * Makes the next version out of `baseVersion`.
 * @returns false, and nothing is changed, when the working copy is no longer at that version.
 */
export async function replacePlanDocument(
  db: Queryable,
  organisationId: string,
  baseVersion: number,
  { planId, ...saved }: SavedDocument,
): Promise<boolean> {
  const ofOrganisation = sql`exists (select 1 from ${plans} where ${plans.id} = ${planDocuments.planId} and ${plans.organisationId} = ${organisationId})`;
  const [{ affectedRows }] = await db
    .update(planDocuments)
    .set({ ...saved, version: baseVersion + 1 })
    .where(and(eq(planDocuments.planId, planId), eq(planDocuments.version, baseVersion), ofOrganisation));
  return affectedRows === 1;
}
