import type { Role } from "~/domain/roles";
import { recordActivity } from "../activity/record";
import type { Queryable } from "../db/client";
import { assignSites, changePerson, grantRoles, insertIdentity, insertUser } from "../db/queries/people";

export interface NewMember {
  organisationId: string;
  name: string;
  /** Where mail for them goes; kept in lower case. */
  email: string;
  roles: readonly Role[];
  /** Sites that somebody without an office role may see. */
  siteIds?: readonly string[];
  /** Who the sign-in provider says they are; without it they sign in by e-mail links. */
  identity?: { issuer: string; subject: string };
}

/** Adds a person to an organisation. @returns their id */
export async function createMember(tx: Queryable, member: NewMember): Promise<string> {
  const { organisationId, name, roles } = member;
  const userId = crypto.randomUUID();
  const now = new Date();
  await insertUser(tx, {
    id: userId,
    organisationId,
    name,
    email: member.email.trim().toLowerCase(),
    createdAt: now,
  });
  await giveRights(tx, userId, member, now);
  await recordActivity(tx, {
    organisationId,
    actorId: null,
    event: "member.added",
    subjectKind: "member",
    subjectId: userId,
    detail: { roles },
  });
  return userId;
}

/** Makes a former member a member again, under the id that their work carries. @returns their id */
export async function reinstateMember(tx: Queryable, userId: string, member: NewMember): Promise<string> {
  const { organisationId, name, roles } = member;
  await changePerson(tx, organisationId, userId, { name, removedAt: null });
  await giveRights(tx, userId, member, new Date());
  await recordActivity(tx, {
    organisationId,
    actorId: null,
    event: "member.reinstated",
    subjectKind: "member",
    subjectId: userId,
    detail: { roles },
  });
  return userId;
}

async function giveRights(tx: Queryable, userId: string, member: NewMember, now: Date): Promise<void> {
  const { organisationId, roles, siteIds = [], identity } = member;
  await grantRoles(tx, organisationId, userId, [...new Set(roles)], now);
  await assignSites(tx, organisationId, userId, siteIds);
  if (identity !== undefined)
    await insertIdentity(tx, { organisationId, ...identity, userId, createdAt: now });
}
