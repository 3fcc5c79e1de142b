import { and, desc, eq, gt, inArray, isNull, lt, or, sql } from "drizzle-orm";
import { type Role, roles as everyRole } from "~/domain/roles";
import type { Queryable } from "../client";
import { invitationLinks, invitations, invitationSites } from "../schema/invitations";
import { deliveries } from "../schema/notices";
import { organisations, users } from "../schema/people";
import { sites } from "../schema/plans";

type Row = typeof invitations.$inferSelect;
export type InvitationRow = Omit<Row, "roles"> & { roles: Role[] };

const withRoles = <T extends { roles: string }>(row: T): Omit<T, "roles"> & { roles: Role[] } => {
  const named = row.roles.split(",");
  return { ...row, roles: everyRole.filter((role) => named.includes(role)) };
};

export async function insertInvitation(
  tx: Queryable,
  {
    siteIds,
    roles,
    ...row
  }: Omit<InvitationRow, "acceptedAt" | "withdrawnAt"> & { siteIds: readonly string[] },
): Promise<void> {
  await tx.insert(invitations).values({ ...row, roles: roles.join(",") });
  const { organisationId, id: invitationId } = row;
  if (siteIds.length > 0)
    await tx
      .insert(invitationSites)
      .values(siteIds.map((siteId) => ({ organisationId, invitationId, siteId })));
}

export async function findInvitation(db: Queryable, organisationId: string, invitationId: string) {
  const [row] = await db
    .select()
    .from(invitations)
    .where(and(eq(invitations.organisationId, organisationId), eq(invitations.id, invitationId)));
  return row && withRoles(row);
}

/** As `findInvitation`; others who would end this invitation wait for the end of the transaction. */
export async function lockInvitation(tx: Queryable, invitationId: string) {
  const [row] = await tx.select().from(invitations).where(eq(invitations.id, invitationId)).for("update");
  return row && withRoles(row);
}

/** An invitation to this address (lower case) that can still be accepted or sent again. */
export async function findUnendedInvitation(db: Queryable, organisationId: string, email: string) {
  const rows = await db
    .select({ id: invitations.id, email: invitations.email })
    .from(invitations)
    .where(
      and(
        eq(invitations.organisationId, organisationId),
        eq(invitations.email, email),
        isNull(invitations.acceptedAt),
        isNull(invitations.withdrawnAt),
      ),
    );
  // The column's collation takes "é" for "e"; mail servers do not.
  return rows.find((row) => row.email === email);
}

/** Sites of an invitation that are there and not archived. */
export async function invitedSiteIds(db: Queryable, invitationId: string): Promise<string[]> {
  const rows = await db
    .select({ siteId: invitationSites.siteId })
    .from(invitationSites)
    .innerJoin(sites, eq(sites.id, invitationSites.siteId))
    .where(and(eq(invitationSites.invitationId, invitationId), isNull(sites.archivedAt)));
  return rows.map(({ siteId }) => siteId);
}

export async function endInvitation(
  tx: Queryable,
  invitationId: string,
  end: { acceptedAt: Date } | { withdrawnAt: Date },
): Promise<void> {
  await tx.update(invitations).set(end).where(eq(invitations.id, invitationId));
}

/** The organisation's invitations, the newest first, each with its newest mail's state and its newest link's end. */
export async function listInvitations(db: Queryable, organisationId: string) {
  const newestMail = db
    .select({
      invitationId: deliveries.invitationId,
      state: deliveries.state,
      lastAnswer: deliveries.lastAnswer,
      age: sql<number>`row_number() over (partition by ${deliveries.invitationId} order by ${deliveries.createdAt} desc, ${deliveries.id} desc)`.as(
        "age",
      ),
    })
    .from(deliveries)
    .where(and(eq(deliveries.organisationId, organisationId), eq(deliveries.kind, "invitation")))
    .as("newest_mail");
  const links = db
    .select({
      invitationId: invitationLinks.invitationId,
      expiresAt: sql`max(${invitationLinks.expiresAt})`.mapWith(invitationLinks.expiresAt).as("expires"),
    })
    .from(invitationLinks)
    .groupBy(invitationLinks.invitationId)
    .as("links");
  const rows = await db
    .select({
      id: invitations.id,
      name: invitations.name,
      email: invitations.email,
      roles: invitations.roles,
      createdAt: invitations.createdAt,
      acceptedAt: invitations.acceptedAt,
      withdrawnAt: invitations.withdrawnAt,
      inviterName: users.name,
      deliveryState: newestMail.state,
      lastAnswer: newestMail.lastAnswer,
      linkExpiresAt: links.expiresAt,
    })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .leftJoin(newestMail, and(eq(newestMail.invitationId, invitations.id), eq(newestMail.age, 1)))
    .leftJoin(links, eq(links.invitationId, invitations.id))
    .where(eq(invitations.organisationId, organisationId))
    .orderBy(desc(invitations.createdAt), desc(invitations.id));
  return rows.map(withRoles);
}

export async function insertInvitationLink(
  db: Queryable,
  row: typeof invitationLinks.$inferInsert,
): Promise<void> {
  await db.insert(invitationLinks).values(row);
}

/** What a link stands for: the invitation with its organisation and whoever sent it. */
export async function findInvitationByLink(db: Queryable, linkId: string) {
  const [row] = await db
    .select({
      invitation: invitations,
      linkExpiresAt: invitationLinks.expiresAt,
      organisationName: organisations.name,
      inviterName: users.name,
    })
    .from(invitationLinks)
    .innerJoin(invitations, eq(invitations.id, invitationLinks.invitationId))
    .innerJoin(organisations, eq(organisations.id, invitations.organisationId))
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(eq(invitationLinks.id, linkId));
  return row && { ...row, invitation: withRoles(row.invitation) };
}

/** What the mail of an invitation says; undefined when it was accepted or withdrawn. */
export async function findInvitationToSend(db: Queryable, invitationId: string) {
  const [row] = await db
    .select({
      id: invitations.id,
      name: invitations.name,
      email: invitations.email,
      roles: invitations.roles,
      organisationName: organisations.name,
      inviterName: users.name,
      inviterEmail: users.email,
      inviterRemovedAt: users.removedAt,
    })
    .from(invitations)
    .innerJoin(organisations, eq(organisations.id, invitations.organisationId))
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(
      and(eq(invitations.id, invitationId), isNull(invitations.acceptedAt), isNull(invitations.withdrawnAt)),
    );
  return row && withRoles(row);
}

/** Forgets invitations that ended before `endedBefore`, or were made before it and have no link that works. */
export async function deleteOldInvitations(db: Queryable, endedBefore: Date, now: Date): Promise<void> {
  const hasLink = sql`exists (select 1 from ${invitationLinks} where ${invitationLinks.invitationId} = ${invitations.id} and ${gt(invitationLinks.expiresAt, now)})`;
  await db
    .delete(invitations)
    .where(
      or(
        lt(invitations.acceptedAt, endedBefore),
        lt(invitations.withdrawnAt, endedBefore),
        and(lt(invitations.createdAt, endedBefore), sql`not ${hasLink}`),
      ),
    );
}

/** Forgets every invitation to exactly this address, its mails and links too. */
export async function deleteInvitationsTo(
  tx: Queryable,
  organisationId: string,
  email: string,
): Promise<void> {
  const rows = await tx
    .select({ id: invitations.id, email: invitations.email })
    .from(invitations)
    .where(and(eq(invitations.organisationId, organisationId), eq(invitations.email, email)));
  const ids = rows.filter((row) => row.email === email).map(({ id }) => id);
  if (ids.length > 0) await tx.delete(invitations).where(inArray(invitations.id, ids));
}
