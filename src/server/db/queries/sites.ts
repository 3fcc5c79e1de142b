import { and, eq, isNull } from "drizzle-orm";
import type { Queryable } from "../client";
import { siteContacts, sites } from "../schema/plans";

export async function findSite(db: Queryable, organisationId: string, siteId: string) {
  const [row] = await db
    .select()
    .from(sites)
    .where(and(eq(sites.organisationId, organisationId), eq(sites.id, siteId), isNull(sites.archivedAt)));
  return row;
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
