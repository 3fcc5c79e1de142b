import { mkdtemp, readdir, rm } from "node:fs/promises";
import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createTransport } from "nodemailer";
import type { SMTPServer } from "smtp-server";
import { afterAll, beforeAll, expect, test } from "vitest";
import { listenOnLoopback } from "../process/lifetime";
import { createMailbox } from "./mailbox";
import { MessageStore } from "./message-store";
import { createSmtpServer } from "./smtp";

let folder: string;
let smtp: SMTPServer;
let web: Server;
let address: string;

const portOf = (server: Server | SMTPServer["server"]) => (server.address() as AddressInfo).port;
const send = (to: string, more: Record<string, unknown> = {}) =>
  createTransport({ host: "127.0.0.1", port: portOf(smtp.server), ignoreTLS: true }).sendMail({
    from: "Stillneedle <notices@stillneedle.example>",
    to,
    subject: "Screening notice · Bay 3",
    text: "Dock 2 is over its budget.\r\n",
    html: '<p>Dock <b>2</b> is over.</p><script>document.title = "broken out"</script>',
    ...more,
  });
const get = async (path: string) => {
  const answer = await fetch(address + path);
  return { status: answer.status, headers: answer.headers, text: await answer.text() };
};
const list = async (query: string) =>
  (JSON.parse((await get(`/api/messages?${query}`)).text) as { messages: { id: string; subject: string }[] })
    .messages;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "mail-fake-"));
  const store = new MessageStore(folder);
  smtp = createSmtpServer(store);
  smtp.on("error", () => {});
  web = createMailbox(store);
  await listenOnLoopback(smtp.server, 0);
  await listenOnLoopback(web, 0);
  address = `http://127.0.0.1:${portOf(web)}`;
});

afterAll(async () => {
  web.closeAllConnections();
  web.close();
  await new Promise<void>((resolve) => smtp.close(resolve));
  await rm(folder, { recursive: true });
});

test("a message is kept as .eml and read back in all its parts", async () => {
  await send("ilka@quillhaven.example", {
    attachments: [{ filename: "positions ü.csv", content: "a;b\n", contentType: "text/csv" }],
  });
  const [summary] = await list("to=ILKA@quillhaven.example");
  const mail = JSON.parse((await get(`/api/messages/${summary?.id}`)).text) as Record<string, unknown>;
  expect(mail).toMatchObject({
    subject: "Screening notice · Bay 3",
    mailFrom: "notices@stillneedle.example",
    recipients: ["ilka@quillhaven.example"],
    from: '"Stillneedle" <notices@stillneedle.example>',
    text: "Dock 2 is over its budget.\n",
    attachments: [{ filename: "positions ü.csv", contentType: "text/csv", contentBase64: "YTtiCg==" }],
  });
  expect((await readdir(folder)).filter((name) => name.endsWith(".eml"))).toHaveLength(1);
  expect(new MessageStore(folder).list("ilka@quillhaven.example")).toHaveLength(1);
  const attachment = await get(`/messages/${summary?.id}/attachments/0`);
  expect(attachment.text).toBe("a;b\n");
  expect(attachment.headers.get("content-disposition")).toContain("attachment;");
});

test("the pages list it, show it in a sandbox, and escape what a stranger wrote", async () => {
  await send("tobias@quillhaven.example", { subject: "<img src=x onerror=alert(1)>" });
  const [summary] = await list("to=tobias@quillhaven.example");
  const all = await get("/?to=tobias@quillhaven.example");
  expect(all.text).toContain("&#60;img src=x");
  expect(all.text).not.toContain("ilka@quillhaven.example");
  expect((await get("/?to=nobody@quillhaven.example")).text).toContain(
    "No message to nobody@quillhaven.example yet.",
  );
  const message = await get(`/messages/${summary?.id}`);
  expect(message.text).toMatch(/<iframe [^>]*sandbox="allow-popups allow-popups-to-escape-sandbox"/);
  const frame = await get(`/messages/${summary?.id}/html`);
  expect(frame.headers.get("content-security-policy")).toMatch(/^sandbox [^;]*; default-src 'none'/);
  expect((await get(`/messages/${summary?.id}?view=text`)).text).toContain("Dock 2 is over its budget.");
  expect((await get(`/messages/${summary?.id}?view=source`)).text).toContain("MIME-Version: 1.0");
  expect((await get("/messages/0-0")).status).toBe(404);
});

test("recipients are refused on demand: for now, for good, and once", async () => {
  await expect(send("refuse-temporarily@site.example")).rejects.toMatchObject({ responseCode: 451 });
  await expect(send("refuse@site.example")).rejects.toMatchObject({ responseCode: 550 });
  await expect(send("refuse-once+a@site.example")).rejects.toMatchObject({ responseCode: 451 });
  await send("refuse-once+a@site.example");
  expect(await list("to=refuse-once%2Ba@site.example")).toHaveLength(1);
  expect(await list("to=refuse@site.example")).toHaveLength(0);
});

test("a test can wait for a message that has not come yet", async () => {
  const waiting = list("to=late@site.example&count=1&waitMs=5000");
  await send("late@site.example");
  expect(await waiting).toHaveLength(1);
});
