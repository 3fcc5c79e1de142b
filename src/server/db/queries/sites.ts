import { and, asc, desc, eq, inArray, isNotNull, isNull } from "drizzle-orm";
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

/** A site that was put away. */
export async function findArchivedSite(db: Queryable, organisationId: string, siteId: string) {
  const [row] = await db
    .select()
    .from(sites)
    .where(and(eq(sites.organisationId, organisationId), eq(sites.id, siteId), isNotNull(sites.archivedAt)));
  return row;
}

export async function listArchivedSites(db: Queryable, organisationId: string) {
  return db
    .select({ id: sites.id, name: sites.name, place: sites.place, archivedAt: sites.archivedAt })
    .from(sites)
    .where(and(eq(sites.organisationId, organisationId), isNotNull(sites.archivedAt)))
    .orderBy(desc(sites.archivedAt), asc(sites.id));
}

/** @returns false when it is so already */
export async function archiveSiteRow(
  tx: Queryable,
  organisationId: string,
  siteId: string,
  archivedAt: Date | null,
): Promise<boolean> {
  const [{ affectedRows }] = await tx
    .update(sites)
    .set({ archivedAt })
    .where(
      and(
        eq(sites.organisationId, organisationId),
        eq(sites.id, siteId),
        archivedAt === null ? isNotNull(sites.archivedAt) : isNull(sites.archivedAt),
      ),
    );
  return affectedRows === 1;
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
