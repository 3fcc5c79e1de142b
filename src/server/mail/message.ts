import { oneLine } from "~/domain/one-line";

/** A person as a mail header names them. */
export interface Mailbox {
  name: string;
  email: string;
}

/** A message as the transport takes it: one recipient, both forms of the text. */
export interface MailMessage {
  /** Without the angle brackets; the same at every attempt. */
  messageId: string;
  to: Mailbox;
  replyTo?: Mailbox;
  subject: string;
  text: string;
  html: string;
  attachments: readonly { fileName: string; mediaType: string; content: string }[];
}

/**
 * `value` as it may stand in a header.
 * @throws Error where it has a line break or another control character: it would begin a header of its own.
 */
export function headerText(value: string, header: string): string {
  if (oneLine(value) !== value)
    throw new Error(`The ${header} of a message has a line break or another control character.`);
  return value;
}

/** One address, and nothing that would be read as several or as a parameter of the SMTP command. */
const bareAddress = /^[^\s@<>,;:"()[\]\\]+@[^\s@<>,;:"()[\]\\]+$/u;

/** @throws Error where the address is not one plain address, or the name would break out of the header. */
export function mailboxHeader({ name, email }: Mailbox, header: string): { name: string; address: string } {
  if (!bareAddress.test(headerText(email, header)))
    throw new Error(`The ${header} address of a message is not one plain address.`);
  return { name: headerText(name, header), address: email };
}
