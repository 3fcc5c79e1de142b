import { mkdtemp, rm } from "node:fs/promises";
import type { Server } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { CodeChallengeMethod, OAuth2Client, generateCodeVerifier } from "arctic";
import { createRemoteJWKSet, jwtVerify, type JWTPayload } from "jose";
import { afterAll, beforeAll, expect, test } from "vitest";
import { freePortBlock } from "../../scripts/services/ports";
import { Visitor } from "../../tests/support/visitor";
import { listenOnLoopback } from "../process/lifetime";
import { providerKeys } from "./keys";
import { createSignInServer } from "./server";

const redirectUri = "http://127.0.0.1:4999/back";
const people = [
  { subject: "ada", name: "Ada <Reed>", email: "ada@site.example", remark: "Planner" },
  { subject: "bo", name: "Bo Lind", email: "bo@site.example", remark: "Auditor" },
];
let folder: string;
let server: Server;
let issuer: string;
let client: OAuth2Client;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "sign-in-fake-"));
  const port = await freePortBlock(1);
  issuer = `http://127.0.0.1:${port}`;
  server = createSignInServer({
    issuer,
    clientId: "stillneedle",
    clientSecret: "secret",
    redirectUris: [redirectUri],
    postLogoutRedirectUris: ["http://127.0.0.1:4999/"],
    people,
    keys: providerKeys(folder),
  });
  await listenOnLoopback(server, port);
  client = new OAuth2Client("stillneedle", "secret", redirectUri);
});

afterAll(async () => {
  server.closeAllConnections();
  server.close();
  await rm(folder, { recursive: true });
});

function authorisation(more: Record<string, string> = {}) {
  const verifier = generateCodeVerifier();
  const url = client.createAuthorizationURLWithPKCE(
    `${issuer}/auth`,
    "state-1",
    CodeChallengeMethod.S256,
    verifier,
    ["openid", "profile", "email"],
  );
  url.searchParams.set("nonce", "nonce-1");
  for (const [name, value] of Object.entries(more)) url.searchParams.set(name, value);
  return { url, verifier };
}

/** The client's redirect address with its parameters, after the person was chosen. */
async function choose(visitor: Visitor, url: URL, subject: string): Promise<URL> {
  let { url: at, response } = await visitor.visit(url);
  expect(at.pathname).toMatch(/^\/people\//);
  expect(await response.text()).toContain("Ada &#60;Reed&#62;");
  response = await visitor.request(at, { method: "POST", body: new URLSearchParams({ subject }) });
  while (!response.headers.get("location")?.startsWith(redirectUri)) {
    at = new URL(response.headers.get("location") ?? "", at);
    response = await visitor.request(at);
  }
  return new URL(response.headers.get("location") ?? "");
}

async function identify(back: URL, verifier: string): Promise<JWTPayload> {
  const tokens = await client.validateAuthorizationCode(
    `${issuer}/token`,
    back.searchParams.get("code") ?? "",
    verifier,
  );
  const keys = createRemoteJWKSet(new URL(`${issuer}/jwks`));
  return (await jwtVerify(tokens.idToken(), keys, { issuer, audience: "stillneedle" })).payload;
}

test("a chosen person comes back with name, address and time of sign-in", async () => {
  const { url, verifier } = authorisation();
  const back = await choose(new Visitor(), url, "ada");
  expect(back.searchParams.get("state")).toBe("state-1");
  const claims = await identify(back, verifier);
  expect(claims).toMatchObject({
    sub: "ada",
    name: "Ada <Reed>",
    email: "ada@site.example",
    nonce: "nonce-1",
  });
  expect(Math.abs(Number(claims["auth_time"]) - Date.now() / 1000)).toBeLessThan(30);
});

test("a code works once, and only with its verifier", async () => {
  const { url, verifier } = authorisation();
  const back = await choose(new Visitor(), url, "bo");
  await expect(identify(back, generateCodeVerifier())).rejects.toThrow();
  const again = authorisation();
  const second = await choose(new Visitor(), again.url, "bo");
  expect((await identify(second, again.verifier)).sub).toBe("bo");
  await expect(identify(second, again.verifier)).rejects.toThrow();
  expect(verifier).not.toBe(again.verifier);
});

test("other redirect addresses, no PKCE and unknown people are refused", async () => {
  const elsewhere = authorisation({ redirect_uri: `${redirectUri}/more` });
  expect((await new Visitor().request(elsewhere.url)).status).toBe(400);
  const bare = authorisation().url;
  bare.searchParams.delete("code_challenge");
  bare.searchParams.delete("code_challenge_method");
  const location = (await new Visitor().request(bare)).headers.get("location") ?? "";
  expect(new URL(location).searchParams.get("error")).toBe("invalid_request");
  const visitor = new Visitor();
  const { url } = await visitor.visit(authorisation().url);
  const nobody = { method: "POST", body: new URLSearchParams({ subject: "mallory" }) };
  expect((await visitor.request(url, nobody)).status).toBe(400);
});

test("the session is real: silence works with it alone, and a fresh sign-in can be demanded", async () => {
  const visitor = new Visitor();
  const silent = { prompt: "none" };
  const without = (await visitor.request(authorisation(silent).url)).headers.get("location") ?? "";
  expect(new URL(without).searchParams.get("error")).toBe("login_required");
  await choose(visitor, authorisation().url, "ada");
  const quiet = authorisation(silent);
  const back = new URL((await visitor.request(quiet.url)).headers.get("location") ?? "");
  expect((await identify(back, quiet.verifier)).sub).toBe("ada");
  const fresh = authorisation({ prompt: "login", max_age: "300" });
  expect((await identify(await choose(visitor, fresh.url, "ada"), fresh.verifier)).sub).toBe("ada");
});

test("another person can be chosen in the same browser", async () => {
  const visitor = new Visitor();
  await choose(visitor, authorisation().url, "ada");
  const second = authorisation();
  expect((await identify(await choose(visitor, second.url, "bo"), second.verifier)).sub).toBe("bo");
});
