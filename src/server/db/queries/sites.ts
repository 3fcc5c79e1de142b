import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import type { Queryable } from "../client";
import { siteContacts, sites } from "../schema/plans";

export type SiteRow = typeof sites.$inferSelect;
export type SiteContactRow = typeof siteContacts.$inferSelect;
export type SiteChange = Partial<Omit<SiteRow, "id" | "organisationId" | "createdAt" | "archivedAt">>;

export async function findSite(db: Queryable, organisationId: string, siteId: string) {
  const [row] = await db
    .select()
    .from(sites)
    .where(and(eq(sites.organisationId, organisationId), eq(sites.id, siteId), isNull(sites.archivedAt)));
  return row;
}

/** The organisation's sites by name; only those of `siteIds` unless it is null. */
export async function listSites(db: Queryable, organisationId: string, siteIds: readonly string[] | null) {
  if (siteIds?.length === 0) return [];
  return db
    .select({ id: sites.id, name: sites.name, place: sites.place, timeZone: sites.timeZone })
    .from(sites)
    .where(
      and(
        eq(sites.organisationId, organisationId),
        isNull(sites.archivedAt),
        siteIds === null ? undefined : inArray(sites.id, [...siteIds]),
      ),
    )
    .orderBy(asc(sites.name));
}

export async function insertSite(db: Queryable, row: typeof sites.$inferInsert): Promise<void> {
  await db.insert(sites).values(row);
}

export async function updateSite(
  db: Queryable,
  organisationId: string,
  siteId: string,
  change: SiteChange,
): Promise<void> {
  await db
    .update(sites)
    .set(change)
    .where(and(eq(sites.organisationId, organisationId), eq(sites.id, siteId)));
}

export async function findContact(db: Queryable, organisationId: string, siteId: string, contactId: string) {
  const [row] = await db
    .select()
    .from(siteContacts)
    .where(
      and(
        eq(siteContacts.organisationId, organisationId),
        eq(siteContacts.siteId, siteId),
        eq(siteContacts.id, contactId),
      ),
    );
  return row;
}

/** The people to notify of a site, by name. */
export async function listContacts(db: Queryable, organisationId: string, siteId: string) {
  return db
    .select()
    .from(siteContacts)
    .where(and(eq(siteContacts.organisationId, organisationId), eq(siteContacts.siteId, siteId)))
    .orderBy(asc(siteContacts.name), asc(siteContacts.email));
}

export async function insertContact(db: Queryable, row: typeof siteContacts.$inferInsert): Promise<void> {
  await db.insert(siteContacts).values(row);
}

export async function deleteContact(
  db: Queryable,
  organisationId: string,
  siteId: string,
  contactId: string,
): Promise<void> {
  await db
    .delete(siteContacts)
    .where(
      and(
        eq(siteContacts.organisationId, organisationId),
        eq(siteContacts.siteId, siteId),
        eq(siteContacts.id, contactId),
      ),
    );
}
