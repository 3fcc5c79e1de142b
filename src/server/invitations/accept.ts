import type { AstroCookies } from "astro";
import type { InvitationProblem } from "~/domain/invitation";
import type { Principal } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { removeCookie, pendingCookieName } from "../auth/cookies";
import { pendingOf } from "../auth/pending";
import { hashOf } from "../auth/secrets";
import { type Proof, signIn } from "../auth/sign-in";
import { db, type Queryable } from "../db/client";
import { isDuplicateEntry } from "../db/duplicate-entry";
import { endInvitation, invitedSiteIds, lockInvitation } from "../db/queries/invitations";
import { lockOrganisation } from "../db/queries/organisations";
import { findMemberByEmail } from "../db/queries/people";
import { deletePendingSignIn } from "../db/queries/sign-ins";
import { env } from "../env";
import { createMember, type NewMember, reinstateMember } from "../organisations/members";
import { invitationOf } from "./links";

type Identity = NonNullable<NewMember["identity"]>;

/** Makes whoever holds the token the member whom the invitation means, and signs them in. */
export async function acceptByLink(
  cookies: AstroCookies,
  principal: Principal,
  token: string,
): Promise<InvitationProblem | null> {
  return acceptAndSignIn(cookies, (tx) => accept(tx, principal, hashOf(token)));
}

/** The invitation that this browser is about to accept, now that the provider has vouched for the person. */
export async function invitationToConfirm(cookies: AstroCookies) {
  const pending = await pendingOf(cookies);
  if (pending?.subject == null || pending.invitationLinkId === null) return { problem: "expired" as const };
  return invitationOf(db(), pending.invitationLinkId);
}

/** Accepts with the identity that the provider has vouched for, and binds it to the new member. */
export async function acceptByProvider(
  cookies: AstroCookies,
  principal: Principal,
): Promise<InvitationProblem | null> {
  const pending = await pendingOf(cookies);
  if (pending?.subject == null || pending.invitationLinkId === null) return "expired";
  const { id, invitationLinkId, subject } = pending;
  removeCookie(cookies, pendingCookieName());
  return acceptAndSignIn(cookies, async (tx) =>
    (await deletePendingSignIn(tx, id))
      ? accept(tx, principal, invitationLinkId, { issuer: env().oidc.issuer, subject })
      : { problem: "expired" },
  );
}

async function acceptAndSignIn(
  cookies: AstroCookies,
  prove: (tx: Queryable) => Promise<Proof<InvitationProblem>>,
): Promise<InvitationProblem | null> {
  try {
    return await signIn(cookies, prove);
  } catch (error) {
    if (isDuplicateEntry(error, "PRIMARY")) return "identity-taken";
    throw error;
  }
}

/** Of several who accept at once one gets through: the organisation and the invitation are held until the end. */
async function accept(
  tx: Queryable,
  principal: Principal,
  linkId: string,
  identity?: Identity,
): Promise<Proof<InvitationProblem>> {
  const linked = await invitationOf(tx, linkId);
  if ("problem" in linked) return linked;
  const { organisationId, id } = linked.invitation;
  // Whoever invites must not become somebody else, an auditor say, by their own invitation.
  if (principal.kind === "member" && principal.organisationId === organisationId)
    return { problem: "signed-in-as-member" };
  await lockOrganisation(tx, organisationId);
  const invitation = await lockInvitation(tx, id);
  if (invitation === undefined) return { problem: "unusable" };
  if (invitation.acceptedAt !== null) return { problem: "accepted" };
  if (invitation.withdrawnAt !== null) return { problem: "withdrawn" };
  const { name, email, roles } = invitation;
  const known = await findMemberByEmail(tx, organisationId, email);
  // The column's collation takes "é" for "e": an address that is only alike must not bring back somebody else.
  if (known !== undefined && (known.removedAt === null || known.email !== email))
    return { problem: "already-member" };
  await endInvitation(tx, id, { acceptedAt: new Date() });
  const member = {
    organisationId,
    name,
    email,
    roles,
    siteIds: await invitedSiteIds(tx, id),
    ...(identity !== undefined && { identity }),
  };
  const userId =
    known === undefined ? await createMember(tx, member) : await reinstateMember(tx, known.id, member);
  await recordActivity(tx, {
    organisationId,
    actorId: userId,
    event: "invitation.accepted",
    subjectKind: "invitation",
    subjectId: id,
    detail: { by: identity === undefined ? "link" : "provider" },
  });
  return { userId, organisationId, by: identity === undefined ? "link" : "provider" };
}
