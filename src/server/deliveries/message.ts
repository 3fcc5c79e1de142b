import type { DeliveryKind } from "~/domain/delivery";
import { mintSignInLink } from "../auth/sign-in-links";
import { db } from "../db/client";
import type { DeliveryRow } from "../db/queries/deliveries";
import { findInvitationToSend } from "../db/queries/invitations";
import { findNoticeMessage, findRecipient } from "../db/queries/notices";
import { findUser } from "../db/queries/people";
import { mintInvitationLink } from "../invitations/links";
import { invitationMail } from "../mail/invitation";
import { findRevisionMail } from "../db/queries/revisions";
import type { MailMessage } from "../mail/message";
import { signInLinkMail } from "../mail/sign-in-link";

const minuteMs = 60_000;
const dayMs = 24 * 60 * minuteMs;

/** The outbox row's message; undefined when who or what it was about is no longer there. */
export async function messageOf(row: DeliveryRow, now: Date): Promise<MailMessage | undefined> {
  return messagesOf[row.kind](row, now);
}

const messagesOf: Record<DeliveryKind, (row: DeliveryRow, now: Date) => Promise<MailMessage | undefined>> = {
  notice: noticeMessage,
  "sign-in-link": signInMessage,
  invitation: invitationMessage,
  revision: revisionMessage,
};

async function invitationMessage(
  { invitationId, messageId }: DeliveryRow,
  now: Date,
): Promise<MailMessage | undefined> {
  const invitation = invitationId === null ? undefined : await findInvitationToSend(db(), invitationId);
  if (invitation === undefined) return undefined;
  const { id, name, email, inviterName, inviterEmail, inviterRemovedAt } = invitation;
  const { url, expiresAt } = await mintInvitationLink(db(), id, now);
  const days = Math.round((expiresAt.getTime() - now.getTime()) / dayMs);
  return {
    messageId,
    to: { name, email },
    ...(inviterRemovedAt === null && { replyTo: { name: inviterName, email: inviterEmail } }),
    ...invitationMail({ ...invitation, url, days }),
    attachments: [],
  };
}

async function revisionMessage({
  organisationId,
  revisionMailId,
  messageId,
}: DeliveryRow): Promise<MailMessage | undefined> {
  const mail =
    revisionMailId === null ? undefined : await findRevisionMail(db(), organisationId, revisionMailId);
  if (mail === undefined) return undefined;
  const { toName, toEmail, subject, text, html } = mail;
  return { messageId, to: { name: toName, email: toEmail }, subject, text, html, attachments: [] };
}

async function noticeMessage({
  organisationId,
  recipientId,
  messageId,
}: DeliveryRow): Promise<MailMessage | undefined> {
  if (recipientId === null) return undefined;
  const recipient = await findRecipient(db(), organisationId, recipientId);
  if (recipient === undefined) return undefined;
  const message = await findNoticeMessage(db(), organisationId, recipient.noticeId);
  if (message === undefined) return undefined;
  return {
    messageId,
    to: { name: recipient.name, email: recipient.email },
    replyTo: { name: message.replyToName, email: message.replyToEmail },
    subject: message.subject,
    text: message.text,
    html: message.html,
    attachments: [
      { fileName: message.csvFileName, mediaType: "text/csv; charset=utf-8", content: message.positionsCsv },
    ],
  };
}

async function signInMessage(
  { userId, messageId }: DeliveryRow,
  now: Date,
): Promise<MailMessage | undefined> {
  const user = userId === null ? undefined : await findUser(db(), userId);
  if (user === undefined || user.removedAt !== null) return undefined;
  const { url, expiresAt } = await mintSignInLink(db(), user.id, now);
  const minutes = Math.round((expiresAt.getTime() - now.getTime()) / minuteMs);
  return {
    messageId,
    to: { name: user.name, email: user.email },
    ...signInLinkMail({ name: user.name, url, minutes }),
    attachments: [],
  };
}
