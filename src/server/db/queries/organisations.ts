import { asc, eq } from "drizzle-orm";
import type { Queryable } from "../client";
import { organisations } from "../schema/people";

export async function insertOrganisation(
  db: Queryable,
  row: typeof organisations.$inferInsert,
): Promise<void> {
  await db.insert(organisations).values(row);
}

export async function findOrganisation(db: Queryable, organisationId: string) {
  const [row] = await db.select().from(organisations).where(eq(organisations.id, organisationId));
  return row;
}

export async function findOrganisationBySlug(db: Queryable, slug: string) {
  const [row] = await db.select().from(organisations).where(eq(organisations.slug, slug));
  return row;
}

export async function listOrganisations(db: Queryable) {
  return db.select().from(organisations).orderBy(asc(organisations.slug));
}

/** Makes others who change this organisation's members wait for the end of the transaction. */
export async function lockOrganisation(db: Queryable, organisationId: string): Promise<void> {
  await db
    .select({ id: organisations.id })
    .from(organisations)
    .where(eq(organisations.id, organisationId))
    .for("update");
}
