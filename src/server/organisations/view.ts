import type { Member } from "~/domain/permissions";
import { headOf } from "../activity/view";
import { db } from "../db/client";
import { findOrganisation } from "../db/queries/organisations";
import { listAssignments, listFormerMembers, listMembers } from "../db/queries/people";
import { listSites } from "../db/queries/sites";

/** The member's organisation with its people, its sites to assign them to, and the head of its activity log. */
export async function organisationView({ organisationId }: Member) {
  const organisation = await findOrganisation(db(), organisationId);
  if (organisation === undefined) throw new Error("A member's organisation is not there.");
  const assignments = await listAssignments(db(), organisationId);
  const members = await listMembers(db(), organisationId);
  return {
    organisation,
    members: members.map((member) => ({
      ...member,
      siteIds: assignments.filter(({ userId }) => userId === member.userId).map(({ siteId }) => siteId),
    })),
    formerMembers: await listFormerMembers(db(), organisationId),
    sites: await listSites(db(), organisationId, null),
    head: await headOf(organisationId),
  };
}
