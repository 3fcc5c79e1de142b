import { mailboxAddress } from "../../scripts/services/local-environment";
import type { TestServices } from "./test-services";

export interface MailSummary {
  id: string;
  receivedAt: string;
  mailFrom: string;
  recipients: string[];
  subject: string;
  from: string;
  messageId: string;
}

export interface Mail extends MailSummary {
  to: string;
  replyTo: string;
  text: string;
  html: string;
  headers: Record<string, string>;
  attachments: { filename: string; contentType: string; sizeBytes: number; contentBase64: string }[];
}

async function get<Answer>(services: TestServices, path: string): Promise<Answer> {
  const response = await fetch(mailboxAddress(services.ports) + path);
  if (!response.ok) throw new Error(`The mailbox answered ${response.status} to ${path}.`);
  return (await response.json()) as Answer;
}

/** Messages to an address, newest first; waits until there are `count`, and fails when they do not come. */
export async function mailsTo(
  services: TestServices,
  address: string,
  { count = 1, waitMs = 15_000 }: { count?: number; waitMs?: number } = {},
): Promise<Mail[]> {
  const query = new URLSearchParams({ to: address, count: String(count), waitMs: String(waitMs) });
  const { messages } = await get<{ messages: MailSummary[] }>(services, `/api/messages?${query}`);
  if (messages.length < count) {
    throw new Error(`${messages.length} message(s) to ${address} came within ${waitMs} ms, not ${count}.`);
  }
  return Promise.all(messages.map(({ id }) => get<Mail>(services, `/api/messages/${id}`)));
}
