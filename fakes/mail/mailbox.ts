import { createServer, type Server } from "node:http";
import type { MessageStore } from "./message-store";
import { listPage, messagePage, type MailView } from "./pages";
import { parseMail, type ParsedMail } from "./parsed-message";

interface Answer {
  status?: number;
  type: string;
  body: string | Buffer;
  headers?: Record<string, string>;
}

const pagePolicy =
  "default-src 'none'; style-src 'unsafe-inline'; img-src data:; frame-src 'self'; form-action 'self'";
/** A message is a stranger's HTML: no scripts, no forms, nothing loaded; its links open a window of their own. */
const messagePolicy =
  "sandbox allow-popups allow-popups-to-escape-sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:";

const html = (body: string, policy = pagePolicy): Answer => ({
  type: "text/html; charset=utf-8",
  body,
  headers: { "content-security-policy": policy },
});
const json = (value: unknown, status = 200): Answer => ({
  status,
  type: "application/json",
  body: JSON.stringify(value),
});

/** The mailbox as pages, and as JSON for tests. */
export function createMailbox(store: MessageStore): Server {
  return createServer((request, response) => {
    const url = new URL(request.url ?? "/", "http://mailbox.example");
    void answer(store, request.method ?? "GET", url)
      .catch((error: unknown) => json({ error: `The mailbox failed: ${String(error)}` }, 500))
      .then(({ status = 200, type, body, headers }) => {
        response.writeHead(status, {
          "content-type": type,
          "cache-control": "no-store",
          "x-content-type-options": "nosniff",
          "referrer-policy": "no-referrer",
          ...headers,
        });
        response.end(request.method === "HEAD" ? undefined : body);
      });
  });
}

async function answer(store: MessageStore, method: string, url: URL): Promise<Answer> {
  if (method !== "GET" && method !== "HEAD") return json({ error: "The mailbox is only read." }, 405);
  const to = url.searchParams.get("to")?.trim() ?? "";
  if (url.pathname === "/") return html(listPage(await parseAll(store, to), to));
  if (url.pathname === "/api/messages")
    return json({ messages: await listForTests(store, url.searchParams) });

  const match = /^\/(api\/)?messages\/([0-9a-f-]+)(?:\/(html|attachments)(?:\/(\d+))?)?$/.exec(url.pathname);
  const [, api, id = "", part, index = "-1"] = match ?? [];
  const stored = store.find(id);
  if (!stored) return json({ error: "There is no such message." }, 404);
  const source = store.source(stored);
  const mail = await parseMail(stored, source);
  if (api) return json(asJson(mail));
  if (part === "attachments") return attachment(mail, Number(index));
  if (part === "html") return html(`<!doctype html><base target="_blank">${mail.html}`, messagePolicy);
  return html(messagePage(mail, viewOf(mail, url.searchParams.get("view")), source.toString("utf8")));
}

const viewOf = (mail: ParsedMail, wanted: string | null): MailView =>
  wanted === "text" || wanted === "source" ? wanted : mail.html ? "html" : "text";

const parseAll = (store: MessageStore, to: string): Promise<ParsedMail[]> =>
  Promise.all(store.list(to).map((stored) => parseMail(stored, store.source(stored))));

/** `to` filters; `count` and `waitMs` make it wait until so many have come. */
async function listForTests(store: MessageStore, query: URLSearchParams): Promise<unknown[]> {
  const to = query.get("to") ?? undefined;
  const messages = await store.waitFor(to, Number(query.get("count") ?? 0), Number(query.get("waitMs") ?? 0));
  return Promise.all(
    messages.map(async (stored) => {
      const { subject, from, messageId } = await parseMail(stored, store.source(stored));
      return { ...stored, subject, from, messageId };
    }),
  );
}

const asJson = (mail: ParsedMail) => ({
  ...mail,
  attachments: mail.attachments.map(({ content, ...rest }) => ({
    ...rest,
    contentBase64: content.toString("base64"),
  })),
});

function attachment(mail: ParsedMail, index: number): Answer {
  const found = mail.attachments[index];
  if (!found) return json({ error: "There is no such attachment." }, 404);
  return {
    type: "application/octet-stream",
    body: found.content,
    headers: {
      "content-disposition": `attachment; filename*=UTF-8''${encodeURIComponent(found.filename)}`,
    },
  };
}
