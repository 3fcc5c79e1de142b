import { and, asc, desc, eq, inArray, isNotNull, isNull } from "drizzle-orm";
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

/** A member of the organisation; nobody who was removed. */
export async function findMember(db: Queryable, organisationId: string, userId: string) {
  const [row] = await db
    .select()
    .from(users)
    .where(and(eq(users.organisationId, organisationId), eq(users.id, userId), isNull(users.removedAt)));
  return row;
}

/** Somebody who was a member and has been removed. */
export async function findFormerMember(db: Queryable, organisationId: string, userId: string) {
  const [row] = await db
    .select()
    .from(users)
    .where(and(eq(users.organisationId, organisationId), eq(users.id, userId), isNotNull(users.removedAt)));
  return row;
}

/** The person of this address (lower case), member or former member. */
export async function findMemberByEmail(db: Queryable, organisationId: string, email: string) {
  const [row] = await db
    .select()
    .from(users)
    .where(and(eq(users.organisationId, organisationId), eq(users.email, email)));
  return row;
}

export async function changePerson(
  tx: Queryable,
  organisationId: string,
  userId: string,
  change: Partial<Pick<UserRow, "name" | "email" | "removedAt" | "erasedAt">>,
): Promise<void> {
  await tx
    .update(users)
    .set(change)
    .where(and(eq(users.organisationId, organisationId), eq(users.id, userId)));
}

export async function deleteIdentities(tx: Queryable, organisationId: string, userId: string): Promise<void> {
  await tx
    .delete(identities)
    .where(and(eq(identities.organisationId, organisationId), eq(identities.userId, userId)));
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

/** The members whose mail goes to exactly this address (lower case), in every organisation. */
export async function findByEmail(db: Queryable, email: string) {
  const rows = await db
    .select({ userId: users.id, organisationId: users.organisationId, email: users.email })
    .from(users)
    .where(and(eq(users.email, email), isNull(users.removedAt)));
  // The column's collation takes "é" for "e"; mail servers do not.
  return rows.filter((row) => row.email === email);
}

/** Every member of the organisation with their roles, by name. */
export async function listMembers(db: Queryable, organisationId: string) {
  const rows = await db
    .select({ userId: users.id, name: users.name, email: users.email, role: memberships.role })
    .from(users)
    .leftJoin(memberships, eq(memberships.userId, users.id))
    .where(and(eq(users.organisationId, organisationId), isNull(users.removedAt)))
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

/** People who were removed, the last first. */
export async function listFormerMembers(db: Queryable, organisationId: string) {
  return db
    .select({ userId: users.id, name: users.name, removedAt: users.removedAt, erasedAt: users.erasedAt })
    .from(users)
    .where(and(eq(users.organisationId, organisationId), isNotNull(users.removedAt)))
    .orderBy(desc(users.removedAt), asc(users.id));
}

/** Everybody who is or was a member, by name. */
export async function listPeople(db: Queryable, organisationId: string) {
  return db
    .select({ userId: users.id, name: users.name, removedAt: users.removedAt })
    .from(users)
    .where(eq(users.organisationId, organisationId))
    .orderBy(asc(users.name), asc(users.id));
}

/** Which sites each member is assigned to. */
export async function listAssignments(db: Queryable, organisationId: string) {
  return db
    .select({ userId: siteAssignments.userId, siteId: siteAssignments.siteId })
    .from(siteAssignments)
    .where(eq(siteAssignments.organisationId, organisationId));
}

export async function withdrawSites(
  tx: Queryable,
  organisationId: string,
  userId: string,
  siteIds: readonly string[],
): Promise<void> {
  if (siteIds.length === 0) return;
  await tx
    .delete(siteAssignments)
    .where(
      and(
        eq(siteAssignments.organisationId, organisationId),
        eq(siteAssignments.userId, userId),
        inArray(siteAssignments.siteId, [...siteIds]),
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
