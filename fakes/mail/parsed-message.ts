import { simpleParser, type AddressObject } from "mailparser";
import type { StoredMessage } from "./message-store";

export interface MailAttachment {
  filename: string;
  contentType: string;
  sizeBytes: number;
  content: Buffer;
}

export interface ParsedMail extends StoredMessage {
  messageId: string;
  subject: string;
  from: string;
  to: string;
  replyTo: string;
  text: string;
  html: string;
  /** Header lines by lower-case name, as they were sent. */
  headers: Record<string, string>;
  attachments: MailAttachment[];
}

export async function parseMail(stored: StoredMessage, source: Buffer): Promise<ParsedMail> {
  const mail = await simpleParser(source);
  return {
    ...stored,
    messageId: mail.messageId ?? "",
    subject: mail.subject ?? "",
    from: addresses(mail.from),
    to: addresses(mail.to),
    replyTo: addresses(mail.replyTo),
    text: mail.text ?? "",
    html: mail.html || "",
    headers: Object.fromEntries(
      mail.headerLines.map(({ key, line }) => [key, line.slice(line.indexOf(":") + 1).trim()]),
    ),
    attachments: mail.attachments.map((attachment, index) => ({
      filename: attachment.filename ?? `part-${index + 1}`,
      contentType: attachment.contentType,
      sizeBytes: attachment.size,
      content: attachment.content,
    })),
  };
}

const addresses = (list: AddressObject | AddressObject[] | undefined): string =>
  [list ?? []]
    .flat()
    .map(({ text }) => text)
    .join(", ");
