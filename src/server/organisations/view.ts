import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { listActivity } from "../db/queries/activity";
import { listDeliveries } from "../db/queries/deliveries";
import { findOrganisation } from "../db/queries/organisations";
import { listMembers } from "../db/queries/people";

const deliveriesShown = 100;
const activityShown = 100;

/** The member's organisation with its people and the newest of its deliveries and of its activity. */
export async function organisationView({ organisationId }: Member) {
  const organisation = await findOrganisation(db(), organisationId);
  if (organisation === undefined) throw new Error("A member's organisation is not there.");
  return {
    organisation,
    members: await listMembers(db(), organisationId),
    deliveries: await listDeliveries(db(), organisationId, deliveriesShown),
    activity: await listActivity(db(), organisationId, activityShown),
  };
}
