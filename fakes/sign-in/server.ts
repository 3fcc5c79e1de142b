import { createServer, type IncomingMessage, type Server, type ServerResponse } from "node:http";
import type Provider from "oidc-provider";
import { escapeHtml, page } from "../process/html";
import type { Person } from "./people";
import { createProvider, type SignInOptions } from "./provider";

type Interaction = InstanceType<Provider["Interaction"]>;

const pagePolicy =
  "default-src 'none'; style-src 'unsafe-inline'; img-src data:; frame-ancestors 'none'; base-uri 'none'";

/** The provider, with the page that shows the people to choose from. */
export function createSignInServer(options: SignInOptions): Server {
  const provider = createProvider(options);
  const protocol = provider.callback();

  const choosePerson = async (request: IncomingMessage, response: ServerResponse): Promise<void> => {
    const details = await provider.interactionDetails(request, response);
    if (request.method !== "POST") {
      return send(response, 200, peoplePage(options.people, details.uid));
    }
    const subject = new URLSearchParams(await readForm(request)).get("subject");
    const person = options.people.find((one) => one.subject === subject);
    if (!person) return send(response, 400, page("Sign in", "<h1>Nobody by that name is on the list</h1>"));
    if (details.session && details.session.accountId !== person.subject) {
      await forgetSession(provider, details, response);
    }
    return provider.interactionFinished(request, response, { login: { accountId: person.subject } });
  };

  return createServer((request, response) => {
    if (!request.url?.startsWith("/people/")) {
      void protocol(request, response);
      return;
    }
    choosePerson(request, response).catch(() => {
      send(
        response,
        400,
        page("Sign in", "<h1>This sign-in has ended</h1><p>Go back and sign in again.</p>"),
      );
    });
  });
}

/** Somebody else was here before: the provider would ask them to sign out first, so their session is left behind. */
async function forgetSession(
  provider: Provider,
  details: Interaction,
  response: ServerResponse,
): Promise<void> {
  delete details.session;
  await details.save(details.exp - Math.floor(Date.now() / 1000));
  const name = provider.cookieName("session");
  response.setHeader(
    "set-cookie",
    [name, `${name}.sig`].map((one) => `${one}=; path=/; max-age=0; httponly`),
  );
}

function send(response: ServerResponse, status: number, body: string): void {
  response.writeHead(status, {
    "content-type": "text/html; charset=utf-8",
    "cache-control": "no-store",
    "content-security-policy": pagePolicy,
  });
  response.end(body);
}

async function readForm(request: IncomingMessage): Promise<string> {
  let body = "";
  for await (const part of request as AsyncIterable<Buffer>) {
    body += part.toString("utf8");
    if (body.length > 10_000) throw new Error("The form is too long.");
  }
  return body;
}

const peoplePage = (people: readonly Person[], uid: string): string =>
  page(
    "Choose who signs in",
    `<h1>Choose who signs in</h1>
<p class="remark">This sign-in service runs on this machine for trying things out, so there are no passwords.</p>
<form method="post" action="/people/${escapeHtml(uid)}"><ul class="people">
${people
  .map(
    ({ subject, name, email, remark }) => `<li><button name="subject" value="${escapeHtml(subject)}">
<strong>${escapeHtml(name)}</strong><span>${escapeHtml(remark)}</span><span>${escapeHtml(email)}</span></button></li>`,
  )
  .join("\n")}
</ul></form>`,
  );
