import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { type Role, roles } from "~/domain/roles";
import { recordActivity } from "../activity/record";
import { renewSession } from "../auth/session";
import { db } from "../db/client";
import { lockOrganisation } from "../db/queries/organisations";
import { adminIds, grantRoles, rolesOf, withdrawRoles } from "../db/queries/people";
import { deleteSessionsOf } from "../db/queries/sessions";
import { judgeRoleChange } from "./role-change";

export const rolesInput = z.object({
  roles: z
    .array(z.enum(roles))
    .min(1, "Leave at least one role.")
    .transform((chosen) => roles.filter((role) => chosen.includes(role))),
});

interface Changed {
  roles: readonly Role[];
  /** The new token of the session that asked, when it changed its own roles. */
  sessionToken: string | null;
}

/**
 * Gives a member exactly these roles. Their sessions end, so that no id from before goes on with other rights; only the
 * session that asks stays, under a new id.
 * @throws Refusal permission.denied, state.conflict
 */
export async function changeRoles(
  actor: Member,
  sessionId: string | null,
  target: { id: string },
  after: readonly Role[],
): Promise<Changed> {
  const { organisationId } = actor;
  const ofOneself = target.id === actor.userId;
  return db().transaction(async (tx) => {
    // Two admins who withdraw each other's role at once must not both succeed.
    await lockOrganisation(tx, organisationId);
    const before = await rolesOf(tx, target.id);
    const admins = await adminIds(tx, organisationId);
    if (!admins.includes(actor.userId))
      throw new Refusal("permission.denied", "You are not an admin any more. Ask one to make the change.");
    const othersAreAdmin = admins.some((id) => id !== target.id);
    const { granted, withdrawn } = judgeRoleChange({ ofOneself, before, after, othersAreAdmin });
    if (granted.length === 0 && withdrawn.length === 0) return { roles: after, sessionToken: null };
    await withdrawRoles(tx, organisationId, target.id, withdrawn);
    await grantRoles(tx, organisationId, target.id, granted, new Date());
    const own = ofOneself && sessionId !== null ? sessionId : undefined;
    await deleteSessionsOf(tx, target.id, own);
    const sessionToken = own === undefined ? null : await renewSession(tx, own);
    await recordActivity(tx, {
      organisationId,
      actorId: actor.userId,
      event: "member.roles-changed",
      subjectKind: "member",
      subjectId: target.id,
      detail: { before, after },
    });
    return { roles: after, sessionToken };
  });
}
