import { and, asc, eq, inArray } from "drizzle-orm";
import type { Role } from "~/domain/roles";
import type { Queryable } from "../client";
import { identities, memberships, organisations, users } from "../schema/people";
import { siteAssignments } from "../schema/plans";

export type UserRow = typeof users.$inferInsert;

export async function insertUser(db: Queryable, row: UserRow): Promise<void> {
  await db.insert(users).values(row);
}

export async function insertIdentity(db: Queryable, row: typeof identities.$inferInsert): Promise<void> {
  await db.insert(identities).values(row);
}

/** A person of the organisation. */
export async function findMember(db: Queryable, organisationId: string, userId: string) {
  const [row] = await db
    .select()
    .from(users)
    .where(and(eq(users.organisationId, organisationId), eq(users.id, userId)));
  return row;
}

/** A person whose organisation is not known yet, as when they sign in. */
export async function findUser(db: Queryable, userId: string) {
  const [row] = await db.select().from(users).where(eq(users.id, userId));
  return row;
}

export async function rolesOf(db: Queryable, userId: string): Promise<Role[]> {
  const rows = await db
    .select({ role: memberships.role })
    .from(memberships)
    .where(eq(memberships.userId, userId))
    .orderBy(asc(memberships.role));
  return rows.map((row) => row.role);
}

export async function siteIdsOf(db: Queryable, userId: string): Promise<string[]> {
  const rows = await db
    .select({ siteId: siteAssignments.siteId })
    .from(siteAssignments)
    .where(eq(siteAssignments.userId, userId));
  return rows.map((row) => row.siteId);
}

/** Who the provider's subject is, one row for each organisation that knows them. */
export async function findByIdentity(db: Queryable, issuer: string, subject: string) {
  return db
    .select({
      userId: identities.userId,
      organisationId: organisations.id,
      organisationName: organisations.name,
      organisationSlug: organisations.slug,
    })
    .from(identities)
    .innerJoin(organisations, eq(organisations.id, identities.organisationId))
    .where(and(eq(identities.issuer, issuer), eq(identities.subject, subject)))
    .orderBy(asc(organisations.name));
}

/** The people whose mail goes to exactly this address (lower case), in every organisation. */
export async function findByEmail(db: Queryable, email: string) {
  const rows = await db
    .select({ userId: users.id, organisationId: users.organisationId, email: users.email })
    .from(users)
    .where(eq(users.email, email));
  // The column's collation takes "é" for "e"; mail servers do not.
  return rows.filter((row) => row.email === email);
}

/** Every person of the organisation with their roles, by name. */
export async function listMembers(db: Queryable, organisationId: string) {
  const rows = await db
    .select({ userId: users.id, name: users.name, email: users.email, role: memberships.role })
    .from(users)
    .leftJoin(memberships, eq(memberships.userId, users.id))
    .where(eq(users.organisationId, organisationId))
    .orderBy(asc(users.name), asc(users.id));
  const members = new Map<string, { userId: string; name: string; email: string; roles: Role[] }>();
  for (const { role, ...person } of rows) {
    const member = members.get(person.userId) ?? { ...person, roles: [] };
    if (role !== null) member.roles.push(role);
    members.set(person.userId, member);
  }
  return [...members.values()];
}

export async function adminIds(db: Queryable, organisationId: string): Promise<string[]> {
  const rows = await db
    .select({ userId: memberships.userId })
    .from(memberships)
    .where(and(eq(memberships.organisationId, organisationId), eq(memberships.role, "admin")));
  return rows.map((row) => row.userId);
}

export async function grantRoles(
  db: Queryable,
  organisationId: string,
  userId: string,
  roles: readonly Role[],
  grantedAt: Date,
): Promise<void> {
  if (roles.length === 0) return;
  await db.insert(memberships).values(roles.map((role) => ({ organisationId, userId, role, grantedAt })));
}

export async function withdrawRoles(
  db: Queryable,
  organisationId: string,
  userId: string,
  roles: readonly Role[],
): Promise<void> {
  if (roles.length === 0) return;
  await db
    .delete(memberships)
    .where(
      and(
        eq(memberships.organisationId, organisationId),
        eq(memberships.userId, userId),
        inArray(memberships.role, [...roles]),
      ),
    );
}

/** Lets somebody without an office role see the sites. */
export async function assignSites(
  db: Queryable,
  organisationId: string,
  userId: string,
  siteIds: readonly string[],
): Promise<void> {
  if (siteIds.length === 0) return;
  await db.insert(siteAssignments).values(siteIds.map((siteId) => ({ organisationId, siteId, userId })));
}
