import { listenOnLoopback, serveUntilStopped } from "../process/lifetime";
import { portOf, readOptions } from "../process/options";
import { createMailbox } from "./mailbox";
import { MessageStore } from "./message-store";
import { createSmtpServer } from "./smtp";

const options = readOptions(["smtp-port", "web-port", "data"]);
const store = new MessageStore(options.data);
const smtp = createSmtpServer(store);
const mailbox = createMailbox(store);
// A client that hangs up in the middle of a message is no fault of the mailbox.
smtp.on("error", () => {});
await listenOnLoopback(smtp.server, portOf(options["smtp-port"]));
await listenOnLoopback(mailbox, portOf(options["web-port"]));
serveUntilStopped(async () => {
  mailbox.closeAllConnections();
  mailbox.close();
  await new Promise<void>((resolve) => smtp.close(resolve));
});
