import { env as variables } from "node:process";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { sessions } from "../../src/server/db/schema/people";
import { giveIdentity } from "../fixtures/identities";
import { newMember, newOrganisation } from "../fixtures/organisation";
import { startOwnProvider, type TokenFields } from "../fixtures/own-provider";
import { startTestApp, type TestApp } from "../support/test-app";

const subject = "ada";
let app: TestApp;
let provider: Awaited<ReturnType<typeof startOwnProvider>>;

beforeAll(async () => {
  provider = await startOwnProvider();
  app = await startTestApp();
  variables["OIDC_ISSUER"] = provider.issuer;
  await giveIdentity(await newMember(await newOrganisation("Token Office"), ["planner"]), subject);
});
afterAll(async () => {
  await app.close();
  await provider.stop();
});

/** Begins a sign-in, has the token endpoint hand out what `make` makes of the right fields, and comes back. */
async function comeBackWith(make: (right: TokenFields) => Promise<string> | string | undefined) {
  const visitor = app.visitor();
  const started = await visitor.request(`${app.origin}/api/sign-in/start`);
  const asked = new URL(started.headers.get("location") ?? "", app.origin).searchParams;
  const right = {
    iss: provider.issuer,
    sub: subject,
    aud: asked.get("client_id") ?? "",
    nonce: asked.get("nonce") ?? "",
    expiresInS: 300,
  };
  provider.issue(await make(right));
  const before = await db().$count(sessions);
  const answer = new URLSearchParams({ code: "issued", state: asked.get("state") ?? "" });
  const response = await visitor.request(`${app.origin}/api/sign-in/return?${answer.toString()}`);
  return {
    goesTo: response.headers.get("location"),
    sessionsMade: (await db().$count(sessions)) - before,
  };
}
const refused = { goesTo: "/sign-in?problem=provider-refused", sessionsMade: 0 };
const signedIn = { goesTo: "/desk", sessionsMade: 1 };

const unsigned = (fields: Record<string, unknown>): string =>
  [{ alg: "none" }, fields].map((part) => Buffer.from(JSON.stringify(part)).toString("base64url")).join(".") +
  ".";

// First, while nothing is known of the provider yet.
it("says that the provider does not answer, and works as soon as it does", async () => {
  await provider.stop();
  const down = await app.visitor().request(`${app.origin}/api/sign-in/start`);
  expect([down.status, down.headers.get("location")]).toEqual([303, "/sign-in?problem=provider-unavailable"]);
  expect(down.headers.getSetCookie()).toEqual([]);
  const page = await app.visitor().visit(`${app.origin}/sign-in?problem=provider-unavailable`);
  expect(await page.response.text()).toContain("have a sign-in link sent to you by e-mail");
  await provider.startAgain();
  expect(await comeBackWith(provider.sign)).toEqual(signedIn);
});

describe("an ID token", () => {
  it("signs in when everything about it is in order", async () => {
    expect(await comeBackWith(provider.sign)).toEqual(signedIn);
    expect(await comeBackWith((right) => provider.sign({ ...right, azp: right.aud as string }))).toEqual(
      signedIn,
    );
  });

  it.each<[string, (right: TokenFields) => TokenFields]>([
    ["another issuer", (right) => ({ ...right, iss: "https://elsewhere.example" })],
    ["another audience", (right) => ({ ...right, aud: "another-application" })],
    [
      "several audiences and no authorised party",
      (right) => ({ ...right, aud: [right.aud as string, "another"] }),
    ],
    ["another authorised party", (right) => ({ ...right, azp: "another-application" })],
    ["another sign-in's nonce", (right) => ({ ...right, nonce: "a".repeat(43) })],
    ["no nonce", ({ iss, sub, aud, expiresInS }) => ({ iss, sub, aud, expiresInS })],
    ["an expiry that has passed", (right) => ({ ...right, expiresInS: -60 })],
    ["an empty subject", (right) => ({ ...right, sub: "" })],
  ])("is refused with %s", async (_, change) => {
    expect(await comeBackWith((right) => provider.sign(change(right)))).toEqual(refused);
  });

  it("is refused without the provider's signature", async () => {
    expect(await comeBackWith(provider.signAsStranger)).toEqual(refused);
    const forged = ({ expiresInS, ...right }: TokenFields) => {
      const nowS = Math.floor(Date.now() / 1000);
      return unsigned({ ...right, iat: nowS, exp: nowS + expiresInS });
    };
    expect(await comeBackWith(forged)).toEqual(refused);
    const tampered = async (right: TokenFields) => {
      const [head = "", body = "", signature = ""] = (await provider.sign({ ...right, sub: "eve" })).split(
        ".",
      );
      const claims = JSON.parse(Buffer.from(body, "base64url").toString()) as Record<string, unknown>;
      const changed = Buffer.from(JSON.stringify({ ...claims, sub: subject })).toString("base64url");
      return [head, changed, signature].join(".");
    };
    expect(await comeBackWith(tampered)).toEqual(refused);
    expect(await comeBackWith(() => "no token at all")).toEqual(refused);
  });

  it("that cannot be had because the provider fails is told as an outage", async () => {
    expect(await comeBackWith(() => undefined)).toEqual({
      goesTo: "/sign-in?problem=provider-unavailable",
      sessionsMade: 0,
    });
  });
});
