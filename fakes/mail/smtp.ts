import { SMTPServer } from "smtp-server";
import type { MessageStore } from "./message-store";
import { createRefusals } from "./refusals";

const largestMessageBytes = 50 * 1024 * 1024;

/** SMTP without TLS and without sign-in, on loopback only; its built-in certificate would be an expired one. */
export function createSmtpServer(store: MessageStore): SMTPServer {
  const refusalOf = createRefusals();
  return new SMTPServer({
    banner: "Mailbox for local use",
    disabledCommands: ["STARTTLS", "AUTH"],
    authOptional: true,
    size: largestMessageBytes,
    logger: false,
    onRcptTo(address, _session, answer) {
      answer(refusalOf(address.address));
    },
    onData(stream, session, answer) {
      const parts: Buffer[] = [];
      stream.on("data", (part: Buffer) => parts.push(part));
      stream.on("end", () => {
        if (stream.sizeExceeded) {
          answer(Object.assign(new Error("Message too large"), { responseCode: 552 }));
          return;
        }
        const { mailFrom, rcptTo } = session.envelope;
        const message = store.add(Buffer.concat(parts), {
          mailFrom: mailFrom ? mailFrom.address : "",
          recipients: rcptTo.map(({ address }) => address),
        });
        answer(null, `Kept as ${message.id}`);
      });
    },
  });
}
