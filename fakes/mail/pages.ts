import { escapeHtml, page } from "../process/html";
import type { ParsedMail } from "./parsed-message";

const time = (iso: string): string =>
  `<time datetime="${iso}">${iso.slice(0, 10)} ${iso.slice(11, 19)} UTC</time>`;

export interface ListedMail {
  id: string;
  receivedAt: string;
  recipients: string[];
  from: string;
  subject: string;
}

export function listPage(mails: readonly ListedMail[], to: string): string {
  const rows = mails.map(
    (mail) => `<tr>
<td><a href="/messages/${mail.id}">${escapeHtml(mail.subject || "(no subject)")}</a></td>
<td>${escapeHtml(mail.recipients.join(", "))}</td>
<td>${time(mail.receivedAt)}</td></tr>`,
  );
  const none = to ? `No message to ${escapeHtml(to)} yet.` : "No message yet.";
  const table = `<table><thead><tr><th scope="col">Subject</th><th scope="col">To</th><th scope="col">Received</th></tr></thead>
<tbody>${rows.join("\n")}</tbody></table>`;
  return page(
    "Mailbox",
    `<h1>Mailbox</h1>
<p class="remark">Every message that was sent on this machine. Nothing has left it.</p>
<form class="filter" method="get" action="/">
<div><label for="to">Recipient</label><input id="to" name="to" type="email" value="${escapeHtml(to)}" autocomplete="off"></div>
<button>Show</button>${to ? '<a href="/">Show all</a>' : ""}
</form>
${rows.length > 0 ? table : `<p>${none}</p>`}`,
  );
}

export type MailView = "html" | "text" | "source";

const viewNames: Record<MailView, string> = { html: "Formatted", text: "Plain text", source: "Source" };

export function messagePage(mail: ParsedMail, view: MailView, source: string): string {
  const address = `/messages/${mail.id}`;
  const views = (Object.keys(viewNames) as MailView[]).filter((one) => one !== "html" || mail.html);
  const links = views.map(
    (one) =>
      `<a href="${address}?view=${one}"${one === view ? ' aria-current="page"' : ""}>${viewNames[one]}</a>`,
  );
  const attachments = mail.attachments.map(
    ({ filename, contentType, sizeBytes }, index) =>
      `<a href="${address}/attachments/${index}">${escapeHtml(filename)}</a> (${escapeHtml(contentType)}, ${sizeBytes} bytes)`,
  );
  const facts: [string, string][] = [
    ["From", escapeHtml(mail.from)],
    ["To", escapeHtml(mail.recipients.join(", "))],
    ["Received", time(mail.receivedAt)],
    ...(attachments.length > 0 ? [["Attachments", attachments.join("<br>")] as [string, string]] : []),
  ];
  return page(
    mail.subject || "Message",
    `<nav><a href="/">All messages</a></nav>
<h1>${escapeHtml(mail.subject || "(no subject)")}</h1>
<dl>${facts.map(([name, value]) => `<dt>${name}</dt><dd>${value}</dd>`).join("")}</dl>
<nav aria-label="Views">${links.join("")}</nav>
${body(mail, view, source)}`,
  );
}

function body(mail: ParsedMail, view: MailView, source: string): string {
  if (view === "source") return `<pre>${escapeHtml(source)}</pre>`;
  if (view === "text") return `<pre>${escapeHtml(mail.text)}</pre>`;
  return `<iframe title="The message" src="/messages/${mail.id}/html" sandbox="allow-popups allow-popups-to-escape-sandbox"></iframe>`;
}
