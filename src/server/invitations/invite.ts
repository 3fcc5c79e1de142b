import { z } from "zod";
import { Refusal } from "~/domain/errors";
import { invitationState } from "~/domain/invitation";
import type { Member } from "~/domain/permissions";
import { roles } from "~/domain/roles";
import { recordActivity } from "../activity/record";
import { limitRate } from "../auth/rate-limit";
import { db, type Queryable } from "../db/client";
import { insertDeliveries } from "../db/queries/deliveries";
import {
  endInvitation,
  findUnendedInvitation,
  insertInvitation,
  type InvitationRow,
  listInvitations,
  lockInvitation,
} from "../db/queries/invitations";
import { lockOrganisation } from "../db/queries/organisations";
import { findMemberByEmail } from "../db/queries/people";
import { newMessageId } from "../mail/message-id";
import { sitesOfOrganisation } from "../organisations/assigned-sites";

export const invitationInput = z.object({
  name: z
    .string()
    .trim()
    .min(1, "Give their name, as notices will show it.")
    .max(200, "Keep the name to 200 characters.")
    .regex(/^[^\p{Cc}]*$/u, "Take line breaks and control characters out of the name."),
  email: z
    .string()
    .trim()
    .toLowerCase()
    .pipe(z.email("Enter an address such as name@company.example.").max(254)),
  roles: z
    .array(z.enum(roles))
    .min(1, "Choose at least one role.")
    .transform((chosen) => roles.filter((role) => chosen.includes(role))),
  siteIds: z.array(z.uuid()).max(1000).default([]),
});

export type InvitationInput = z.output<typeof invitationInput>;

const refuseEmail = (message: string) =>
  new Refusal("input.refused", message, { faults: [{ path: "email", message }] });

/**
 * Asks somebody by e-mail to become a member.
 * @throws Refusal input.refused where the address is a member's or has an invitation, or a site is not there; rate.exceeded
 */
export async function invite(actor: Member, input: InvitationInput): Promise<{ id: string }> {
  await limitRate("invitation", actor.organisationId);
  return { id: await db().transaction((tx) => writeInvitation(tx, actor, input)) };
}

/** Writes the invitation and its mail. @returns its id @throws Refusal input.refused */
export async function writeInvitation(
  tx: Queryable,
  actor: Member,
  { name, email, roles: invitedRoles, siteIds }: InvitationInput,
): Promise<string> {
  const { organisationId, userId } = actor;
  await lockOrganisation(tx, organisationId);
  const known = await findMemberByEmail(tx, organisationId, email);
  if (known !== undefined && (known.removedAt === null || known.email !== email))
    throw refuseEmail(
      "Somebody with this address, or one nearly alike, is a member already. Change their roles in the list.",
    );
  if ((await findUnendedInvitation(tx, organisationId, email)) !== undefined)
    throw refuseEmail("This address has an invitation already. Send that one again, or withdraw it first.");
  const sites = await sitesOfOrganisation(tx, organisationId, siteIds);
  const id = crypto.randomUUID();
  const now = new Date();
  await insertInvitation(tx, {
    id,
    organisationId,
    name,
    email,
    roles: invitedRoles,
    invitedBy: userId,
    createdAt: now,
    siteIds: sites,
  });
  await putInOutbox(tx, { id, organisationId }, now);
  await recordDeed(tx, actor, { id }, "invitation.made", { roles: invitedRoles, siteIds: sites });
  return id;
}

/** Has a new link mailed; the ones before it go on until they run out. @throws Refusal state.conflict, rate.exceeded */
export async function sendAgain(actor: Member, { id }: Pick<InvitationRow, "id">): Promise<void> {
  await limitRate("invitation", actor.organisationId);
  await limitRate("invitation-mail", id);
  await db().transaction(async (tx) => {
    const row = await lockUnended(tx, id);
    await putInOutbox(tx, row, new Date());
    await recordDeed(tx, actor, row, "invitation.sent-again");
  });
}

/** Makes every link of the invitation useless. @throws Refusal state.conflict */
export async function withdraw(actor: Member, { id }: Pick<InvitationRow, "id">): Promise<void> {
  await db().transaction(async (tx) => {
    const row = await lockUnended(tx, id);
    await endInvitation(tx, id, { withdrawnAt: new Date() });
    await recordDeed(tx, actor, row, "invitation.withdrawn");
  });
}

/** The organisation's invitations with the state of each, the newest first. */
export async function invitationsOf({ organisationId }: Member, now = new Date()) {
  const rows = await listInvitations(db(), organisationId);
  return rows.map((row) => ({ ...row, state: invitationState(row, now) }));
}

async function lockUnended(tx: Queryable, id: string): Promise<InvitationRow> {
  const row = await lockInvitation(tx, id);
  if (row !== undefined && row.acceptedAt === null && row.withdrawnAt === null) return row;
  throw new Refusal(
    "state.conflict",
    `This invitation has been ${row?.acceptedAt == null ? "withdrawn" : "accepted"} meanwhile. Reload the page to see.`,
  );
}

const putInOutbox = (
  tx: Queryable,
  { id, organisationId }: { id: string; organisationId: string },
  now: Date,
) =>
  insertDeliveries(tx, [
    {
      id: crypto.randomUUID(),
      organisationId,
      kind: "invitation",
      invitationId: id,
      messageId: newMessageId(),
      state: "waiting",
      attempts: 0,
      nextAttemptAt: now,
      createdAt: now,
    },
  ]);

const recordDeed = (
  tx: Queryable,
  { organisationId, userId }: Member,
  { id }: { id: string },
  event: "invitation.made" | "invitation.sent-again" | "invitation.withdrawn",
  detail: Record<string, unknown> = {},
) =>
  recordActivity(tx, {
    organisationId,
    actorId: userId,
    event,
    subjectKind: "invitation",
    subjectId: id,
    detail,
  });
