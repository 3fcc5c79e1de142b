import { createTransport } from "nodemailer";
import { env } from "../env";
import { headerText, mailboxHeader, type MailMessage } from "./message";

const loopbackHosts = new Set(["127.0.0.1", "localhost", "[::1]"]);

/** Longest that one message may take from connecting to the server's last answer. */
export const sendLimitMs = 120_000;

export interface MailTransport {
  /** @returns the server's answer. @throws what nodemailer throws; `judgeFailure` says what it means. */
  send(message: MailMessage): Promise<string>;
  close(): void;
}

/** The way to the mail server of SMTP_URL; each message has a connection of its own, so none idles between them. */
export function openMailTransport(): MailTransport {
  const { smtpUrl, mailFrom } = env();
  const transport = createTransport({
    url: smtpUrl,
    // A mail server on this machine has no certificate that its loopback address could match.
    ignoreTLS: loopbackHosts.has(new URL(smtpUrl).hostname),
    connectionTimeout: 15_000,
    greetingTimeout: 15_000,
    socketTimeout: 60_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    async send(message) {
      const info = await transport.sendMail({
        from: mailFrom,
        to: [mailboxHeader(message.to, "To")],
        ...(message.replyTo && { replyTo: mailboxHeader(message.replyTo, "Reply-To") }),
        messageId: `<${headerText(message.messageId, "Message-ID")}>`,
        subject: headerText(message.subject, "Subject"),
        // Vacation replies to a notice would go to the planner.
        headers: { "Auto-Submitted": "auto-generated" },
        text: message.text,
        html: message.html,
        attachments: message.attachments.map(({ fileName, mediaType, content }) => ({
          filename: headerText(fileName, "attachment's name"),
          contentType: mediaType,
          content,
        })),
        signal: AbortSignal.timeout(sendLimitMs),
      });
      return info.response;
    },
    close: () => transport.close(),
  };
}
