import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { deleteInvitationsTo } from "../db/queries/invitations";
import { lockOrganisation } from "../db/queries/organisations";
import {
  adminIds,
  changePerson,
  deleteIdentities,
  findFormerMember,
  findMember,
  rolesOf,
  siteIdsOf,
  withdrawRoles,
  withdrawSites,
} from "../db/queries/people";
import { deleteSessionsOf } from "../db/queries/sessions";
import { deleteSignInLinksOf } from "../db/queries/sign-ins";
import { judgeRoleChange } from "./role-change";

/** What stands in the place of an erased person's name. */
export const erasedName = "a former member";

/** No mail goes there (RFC 2606), and no two are the same. */
const erasedEmail = (userId: string): string => `${userId}@erased.invalid`;

/**
 * Ends somebody's membership: roles, sites, identities, sessions and links go at once. Their work stays, under their name.
 * @throws Refusal permission.denied, state.conflict
 */
export async function removeMember(actor: Member, target: { id: string }): Promise<void> {
  const { organisationId } = actor;
  if (target.id === actor.userId)
    throw new Refusal(
      "permission.denied",
      "Nobody removes themselves. Ask another admin of your organisation.",
    );
  await db().transaction(async (tx) => {
    // Two admins who remove each other at once must not both succeed.
    await lockOrganisation(tx, organisationId);
    const admins = await adminIds(tx, organisationId);
    if (!admins.includes(actor.userId))
      throw new Refusal("permission.denied", "You are not an admin any more. Ask one to make the change.");
    if ((await findMember(tx, organisationId, target.id)) === undefined)
      throw new Refusal("state.conflict", "This person has been removed already. Reload the page to see.");
    const before = await rolesOf(tx, target.id);
    const othersAreAdmin = admins.some((id) => id !== target.id);
    judgeRoleChange({ ofOneself: false, before, after: [], othersAreAdmin });
    await withdrawRoles(tx, organisationId, target.id, before);
    await withdrawSites(tx, organisationId, target.id, await siteIdsOf(tx, target.id));
    await deleteIdentities(tx, organisationId, target.id);
    await deleteSignInLinksOf(tx, target.id);
    await deleteSessionsOf(tx, target.id);
    await changePerson(tx, organisationId, target.id, { removedAt: new Date() });
    await recordActivity(tx, {
      organisationId,
      actorId: actor.userId,
      event: "member.removed",
      subjectKind: "member",
      subjectId: target.id,
      detail: { roles: before },
    });
  });
}

/**
 * Overwrites name and address of a former member for good, and forgets invitations to that address. The activity log names
 * people by id and stays whole; what was sent or signed under the name keeps it.
 * @throws Refusal state.conflict
 */
export async function erasePerson(actor: Member, target: { id: string }): Promise<void> {
  const { organisationId } = actor;
  await db().transaction(async (tx) => {
    await lockOrganisation(tx, organisationId);
    const person = await findFormerMember(tx, organisationId, target.id);
    if (person === undefined || person.erasedAt !== null)
      throw new Refusal(
        "state.conflict",
        "This person is a member again, or has been erased already. Reload the page to see.",
      );
    await deleteInvitationsTo(tx, organisationId, person.email);
    await changePerson(tx, organisationId, target.id, {
      name: erasedName,
      email: erasedEmail(target.id),
      erasedAt: new Date(),
    });
    await recordActivity(tx, {
      organisationId,
      actorId: actor.userId,
      event: "member.erased",
      subjectKind: "member",
      subjectId: target.id,
    });
  });
}
