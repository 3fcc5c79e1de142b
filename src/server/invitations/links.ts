import { invitationLifetimeMs, type InvitationProblem } from "~/domain/invitation";
import { hashOf, newToken } from "../auth/secrets";
import { db, type Queryable } from "../db/client";
import { findInvitationByLink, insertInvitationLink } from "../db/queries/invitations";
import { env } from "../env";

/** Makes a link for an invitation; the caller mails it and forgets it. Only its hash is kept. */
export async function mintInvitationLink(
  db: Queryable,
  invitationId: string,
  now = new Date(),
): Promise<{ url: string; expiresAt: Date }> {
  const token = newToken();
  const expiresAt = new Date(now.getTime() + invitationLifetimeMs);
  await insertInvitationLink(db, { id: hashOf(token), invitationId, createdAt: now, expiresAt });
  return { url: `${env().appOrigin}/invitations/accept?token=${token}`, expiresAt };
}

type Linked = NonNullable<Awaited<ReturnType<typeof findInvitationByLink>>>;

/** What a link invites to, or why it does not any more. */
export async function invitationOf(
  db: Queryable,
  linkId: string,
  now = new Date(),
): Promise<Linked | { problem: InvitationProblem }> {
  const found = await findInvitationByLink(db, linkId);
  if (found === undefined) return { problem: "unusable" };
  if (found.invitation.acceptedAt !== null) return { problem: "accepted" };
  if (found.invitation.withdrawnAt !== null) return { problem: "withdrawn" };
  return found.linkExpiresAt <= now ? { problem: "lapsed" } : found;
}

/** As `invitationOf`, for whoever opens the page with the token; changes nothing. */
export const openInvitation = (token: string) => invitationOf(db(), hashOf(token));
