import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { lockOrganisation } from "../db/queries/organisations";
import { assignSites, listAssignments, listMembers, siteIdsOf, withdrawSites } from "../db/queries/people";
import { sitesOfOrganisation } from "./assigned-sites";

export const sitesInput = z.object({ siteIds: z.array(z.uuid()).max(1000) });
export const installersInput = z.object({ userIds: z.array(z.uuid()).max(1000) });

const differences = (before: readonly string[], after: readonly string[]) => ({
  granted: after.filter((id) => !before.includes(id)),
  withdrawn: before.filter((id) => !after.includes(id)),
});

/** Lets a member see exactly these sites, as far as their roles do not show them all. @throws Refusal input.refused */
export async function changeSitesOf(
  actor: Member,
  target: { id: string },
  siteIds: readonly string[],
): Promise<{ siteIds: string[] }> {
  const { organisationId } = actor;
  return db().transaction(async (tx) => {
    await lockOrganisation(tx, organisationId);
    const after = await sitesOfOrganisation(tx, organisationId, siteIds);
    const { granted, withdrawn } = differences(await siteIdsOf(tx, target.id), after);
    if (granted.length === 0 && withdrawn.length === 0) return { siteIds: after };
    await withdrawSites(tx, organisationId, target.id, withdrawn);
    await assignSites(tx, organisationId, target.id, granted);
    await recordActivity(tx, {
      organisationId,
      actorId: actor.userId,
      event: "member.sites-changed",
      subjectKind: "member",
      subjectId: target.id,
      detail: { granted, withdrawn },
    });
    return { siteIds: after };
  });
}

/** The organisation's installers, and whether each is assigned to the site. */
export async function installersOf({ organisationId }: Pick<Member, "organisationId">, siteId: string) {
  const assignments = await listAssignments(db(), organisationId);
  const assigned = new Set(assignments.filter((one) => one.siteId === siteId).map(({ userId }) => userId));
  return (await listMembers(db(), organisationId))
    .filter(({ roles }) => roles.includes("installer"))
    .map(({ userId, name, roles }) => ({
      userId,
      name,
      isAssigned: assigned.has(userId),
      seesEverySite: roles.some((role) => role !== "installer"),
    }));
}

/** Assigns exactly these of the organisation's installers to the site. @throws Refusal input.refused */
export async function changeInstallers(
  actor: Member,
  site: { id: string },
  userIds: readonly string[],
): Promise<{ userIds: string[] }> {
  const { organisationId } = actor;
  return db().transaction(async (tx) => {
    await lockOrganisation(tx, organisationId);
    const installers = (await listMembers(tx, organisationId)).filter(({ roles }) =>
      roles.includes("installer"),
    );
    const after = [...new Set(userIds)];
    if (!after.every((id) => installers.some(({ userId }) => userId === id))) {
      const message = "One of these people is no installer any more. Reload the page and choose again.";
      throw new Refusal("input.refused", message, { faults: [{ path: "userIds", message }] });
    }
    const before = (await listAssignments(tx, organisationId))
      .filter(({ siteId, userId }) => siteId === site.id && installers.some((one) => one.userId === userId))
      .map(({ userId }) => userId);
    const { granted, withdrawn } = differences(before, after);
    if (granted.length === 0 && withdrawn.length === 0) return { userIds: after };
    for (const userId of withdrawn) await withdrawSites(tx, organisationId, userId, [site.id]);
    for (const userId of granted) await assignSites(tx, organisationId, userId, [site.id]);
    await recordActivity(tx, {
      organisationId,
      actorId: actor.userId,
      event: "site.installers-changed",
      subjectKind: "site",
      subjectId: site.id,
      detail: { granted, withdrawn },
    });
    return { userIds: after };
  });
}
