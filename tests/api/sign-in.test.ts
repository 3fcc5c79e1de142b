import { eq } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { hashOf } from "../../src/server/auth/secrets";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { pendingSignIns, sessions } from "../../src/server/db/schema/people";
import { env } from "../../src/server/env";
import { giveIdentity } from "../fixtures/identities";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { signIn } from "../support/sign-in";
import { startTestApp, type TestApp } from "../support/test-app";
import type { Visitor } from "../support/visitor";

let app: TestApp;
let organisation: { id: string; name: string };
let planner: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
  organisation = await newOrganisation("Provider Office");
  planner = await newMember(organisation, ["planner"]);
  await giveIdentity(planner, "farnwick.planner");
});
afterAll(() => app.close());

const cookieLine = (response: Response, name: string) =>
  response.headers.getSetCookie().find((line) => line.startsWith(`${name}=`));
const cookieValue = (line: string | undefined) => /=([^;]*)/.exec(line ?? "")?.[1] ?? "";
const locationOf = (response: Response) => new URL(response.headers.get("location") ?? "", app.origin);
const problemOf = (response: Response) => locationOf(response).searchParams.get("problem");

/** Begins a sign-in; the provider is not visited. */
async function start(visitor: Visitor, query = "") {
  const response = await visitor.request(`${app.origin}/api/sign-in/start${query}`);
  return {
    response,
    provider: locationOf(response),
    state: locationOf(response).searchParams.get("state") ?? "",
  };
}
const comeBack = (visitor: Visitor, answer: Record<string, string>) =>
  visitor.request(`${app.origin}/api/sign-in/return?${new URLSearchParams(answer).toString()}`);

/** Goes to the provider as `subject` and stops before the address to come back to is opened. */
async function answerOfProvider(visitor: Visitor, subject: string, query = ""): Promise<URL> {
  const { provider } = await start(visitor, query);
  const people = await visitor.visit(provider);
  let response = await visitor.request(people.url, {
    method: "POST",
    body: new URLSearchParams({ subject }),
  });
  let at = people.url;
  for (;;) {
    at = new URL(response.headers.get("location") ?? "", at);
    if (at.pathname === "/api/sign-in/return") return at;
    response = await visitor.request(at);
  }
}

describe("starting a sign-in", () => {
  it("sends the browser to the provider with a state, a nonce and a code challenge, and no more than who it is", async () => {
    const { response, provider } = await start(app.visitor());
    expect(response.status).toBe(303);
    expect(provider.origin).toBe(new URL(env().oidc.issuer).origin);
    const asked = Object.fromEntries(provider.searchParams);
    expect(asked).toMatchObject({
      response_type: "code",
      client_id: env().oidc.clientId,
      redirect_uri: `${app.origin}/api/sign-in/return`,
      code_challenge_method: "S256",
      scope: "openid",
    });
    for (const name of ["state", "nonce", "code_challenge"])
      expect(Buffer.from(asked[name] ?? "", "base64url")).toHaveLength(32);
  });

  it("is bound to the browser by a cookie that no script reads and of which only the hash is kept", async () => {
    const { response, state } = await start(app.visitor());
    const line = cookieLine(response, "stillneedle-sign-in");
    expect(line).toMatch(/; Max-Age=600; Path=\/; HttpOnly; SameSite=Lax$/);
    const token = cookieValue(line);
    const [row] = await db().select().from(pendingSignIns).where(eq(pendingSignIns.state, state));
    expect(row?.id).toBe(hashOf(token));
    expect(JSON.stringify(row)).not.toContain(token);
    expect((row?.expiresAt.getTime() ?? 0) - Date.now()).toBeLessThanOrEqual(600_000);
  });

  it("makes new secrets each time", async () => {
    const [one, other] = [await start(app.visitor()), await start(app.visitor())];
    for (const name of ["state", "nonce", "code_challenge"])
      expect(one.provider.searchParams.get(name)).not.toBe(other.provider.searchParams.get(name));
  });
});

describe("coming back from the provider", () => {
  it("signs in whom the organisation knows, on the page that was asked for, and writes it into the log", async () => {
    const visitor = app.visitor();
    const address = await answerOfProvider(visitor, "farnwick.planner", "?returnTo=%2Faccount");
    const response = await visitor.request(address);
    expect([response.status, response.headers.get("location")]).toEqual([303, "/account"]);
    const line = cookieLine(response, "stillneedle-session");
    expect(line).toMatch(/; Max-Age=43200; Path=\/; HttpOnly; SameSite=Lax$/);
    expect(cookieLine(response, "stillneedle-sign-in")).toContain("1970");
    const [session] = await db()
      .select()
      .from(sessions)
      .where(eq(sessions.id, hashOf(cookieValue(line))));
    expect(session?.userId).toBe(planner.userId);
    const account = await visitor.request(`${app.origin}/account`);
    expect([account.status, await account.text()]).toEqual([200, expect.stringContaining(planner.name)]);
    const [entry] = await listActivity(db(), organisation.id, 1);
    expect(entry).toMatchObject({ event: "session.started", actorName: planner.name });
  });

  it("leads to the Desk when the page asked for is not one of ours", async () => {
    const visitor = app.visitor();
    const query = `?returnTo=${encodeURIComponent("//elsewhere.example")}`;
    const response = await visitor.request(await answerOfProvider(visitor, "farnwick.planner", query));
    expect(response.headers.get("location")).toBe("/desk");
  });

  it("gives the session a new id when somebody signs in again, and ends the old one", async () => {
    const visitor = app.visitor();
    const before = await visitor.request(await answerOfProvider(visitor, "farnwick.planner"));
    const after = await visitor.request(await answerOfProvider(visitor, "farnwick.planner"));
    const [old, fresh] = [before, after].map((one) => cookieValue(cookieLine(one, "stillneedle-session")));
    expect(old).not.toBe(fresh);
    const rows = await db()
      .select()
      .from(sessions)
      .where(eq(sessions.id, hashOf(old ?? "")));
    expect(rows).toEqual([]);
  });

  it("counts once", async () => {
    const visitor = app.visitor();
    const address = await answerOfProvider(visitor, "farnwick.planner");
    const [one, other] = await Promise.all([visitor.request(address), visitor.request(address)]);
    const problems = [problemOf(one), problemOf(other)].sort();
    expect(problems).toEqual(["expired", null]);
    expect(problemOf(await visitor.request(address))).toBe("expired");
  });

  it("is refused in another browser", async () => {
    const address = await answerOfProvider(app.visitor(), "farnwick.planner");
    const stranger = app.visitor();
    expect(problemOf(await stranger.request(address))).toBe("expired");
    await start(stranger);
    const response = await stranger.request(address);
    expect(problemOf(response)).toBe("expired");
    expect(cookieLine(response, "stillneedle-session")).toBeUndefined();
  });

  it("is refused without its state, and the sign-in under way goes on", async () => {
    const visitor = app.visitor();
    const address = await answerOfProvider(visitor, "farnwick.planner");
    const code = address.searchParams.get("code") ?? "";
    expect(problemOf(await comeBack(visitor, { code }))).toBe("expired");
    expect(problemOf(await comeBack(visitor, { code, state: "a".repeat(43) }))).toBe("expired");
    expect(problemOf(await visitor.request(address))).toBe(null);
  });

  it("is refused after ten minutes", async () => {
    const visitor = app.visitor();
    const address = await answerOfProvider(visitor, "farnwick.planner");
    await db()
      .update(pendingSignIns)
      .set({ expiresAt: new Date(Date.now() - 1) })
      .where(eq(pendingSignIns.state, address.searchParams.get("state") ?? ""));
    expect(problemOf(await visitor.request(address))).toBe("expired");
  });

  it("is refused with a code of the provider's for another sign-in", async () => {
    const other = await answerOfProvider(app.visitor(), "farnwick.planner");
    const visitor = app.visitor();
    const { state } = await start(visitor);
    const response = await comeBack(visitor, { code: other.searchParams.get("code") ?? "", state });
    expect(problemOf(response)).toBe("provider-refused");
  });

  it("is refused with an answer that names another provider", async () => {
    const visitor = app.visitor();
    const address = await answerOfProvider(visitor, "farnwick.planner");
    expect(address.searchParams.get("iss")).toBe(env().oidc.issuer);
    address.searchParams.set("iss", "https://elsewhere.example");
    expect(problemOf(await visitor.request(address))).toBe("provider-refused");
  });

  it.each([
    ["declined", { error: "access_denied" }],
    ["provider-refused", { error: "server_error" }],
    ["provider-refused", { code: "never-issued" }],
    ["provider-refused", {}],
  ])("tells %s for %o", async (problem, answer) => {
    const visitor = app.visitor();
    const { state } = await start(visitor);
    expect(problemOf(await comeBack(visitor, { ...answer, state }))).toBe(problem);
  });

  it("tells somebody whom no organisation knows that an admin has to add them", async () => {
    const { url, response } = await signIn(app.visitor(), app.origin, "no.member");
    expect([url.pathname, url.searchParams.get("problem")]).toEqual(["/sign-in", "unknown-person"]);
    expect(await response.text()).toContain("Ask an admin of your organisation to add you");
  });

  it("never takes an e-mail address for an identity", async () => {
    // The provider vouches for auditor@farnwick.example; a member has that address and another subject.
    const namesake = await newMember(organisation, ["auditor"]);
    await giveIdentity(namesake, "somebody.else");
    const { url } = await signIn(app.visitor(), app.origin, "farnwick.auditor");
    expect(url.searchParams.get("problem")).toBe("unknown-person");
  });
});

describe("somebody of several organisations", () => {
  let second: { id: string; name: string };
  let elsewhere: SignedInMember;

  beforeAll(async () => {
    second = await newOrganisation("Second Office");
    const first = await newMember(organisation, ["admin"]);
    elsewhere = await newMember(second, ["planner"]);
    await giveIdentity(first, "farnwick.admin");
    await giveIdentity(elsewhere, "farnwick.admin");
  });

  const choose = (visitor: Visitor, organisationId: string) =>
    visitor.request(`${app.origin}/api/sign-in/organisation`, {
      method: "POST",
      body: new URLSearchParams({ organisationId }),
    });

  it("is asked which, and is signed in to that one", async () => {
    const visitor = app.visitor();
    const { url, response } = await signIn(
      visitor,
      app.origin,
      "farnwick.admin",
      "/api/sign-in/start?returnTo=/account",
    );
    expect(url.pathname).toBe("/sign-in/organisation");
    const page = await response.text();
    expect(page).toContain(organisation.name);
    expect(page).toContain(second.name);
    const chosen = await choose(visitor, second.id);
    expect(chosen.headers.get("location")).toBe("/account");
    expect(await (await visitor.request(`${app.origin}/account`)).text()).toContain(elsewhere.name);
    expect(problemOf(await choose(visitor, organisation.id))).toBe("expired");
  });

  it("cannot choose one that they do not belong to", async () => {
    const visitor = app.visitor();
    await signIn(visitor, app.origin, "farnwick.admin");
    const third = await newOrganisation("Third Office");
    expect(problemOf(await choose(visitor, third.id))).toBe("unknown-person");
    expect((await visitor.request(`${app.origin}/account`)).status).toBe(303);
  });

  it("is not asked when the address named the organisation; a name that is not known is passed over", async () => {
    const named = await signIn(
      app.visitor(),
      app.origin,
      "farnwick.admin",
      "/api/sign-in/start?organisation=second-office",
    );
    expect(named.url.pathname).toBe("/desk");
    const unknown = await signIn(
      app.visitor(),
      app.origin,
      "farnwick.admin",
      "/api/sign-in/start?organisation=nobody",
    );
    expect(unknown.url.pathname).toBe("/sign-in/organisation");
  });

  it("is told when nobody has to choose", async () => {
    const visitor = app.visitor();
    await start(visitor);
    expect(problemOf(await choose(visitor, organisation.id))).toBe("expired");
  });
});
