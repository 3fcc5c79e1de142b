import { env as variables } from "node:process";
import request from "supertest";
import { afterAll, beforeAll, expect, it } from "vitest";
import { mintSignInLink } from "../../src/server/auth/sign-in-links";
import { db } from "../../src/server/db/client";
import { newMember, newOrganisation } from "../fixtures/organisation";
import { startTestApp, type TestApp } from "../support/test-app";

const origin = "https://plans.example";
let app: TestApp;

beforeAll(async () => {
  app = await startTestApp();
  Object.assign(variables, { APP_ORIGIN: origin, LOCAL_FAKES: "0" });
});
afterAll(() => app.close());

const cookieOf = (answer: request.Response) => answer.headers["set-cookie"]?.[0] ?? "";

it("gives out cookies that browsers keep to this host and to https", async () => {
  const member = await newMember(await newOrganisation("Secure Office"), ["planner"]);
  const { url } = await mintSignInLink(db(), member.userId);
  const signedIn = await request(app.server)
    .post("/api/sign-in/token")
    .set("Origin", origin)
    .type("form")
    .send({ token: new URL(url).searchParams.get("token") });
  expect([signedIn.status, signedIn.headers["location"]]).toEqual([303, "/desk"]);
  const cookie = cookieOf(signedIn);
  expect(cookie).toMatch(
    /^__Host-stillneedle-session=[\w-]{43}; Max-Age=43200; Path=\/; HttpOnly; Secure; SameSite=Lax$/,
  );
  expect(signedIn.headers["strict-transport-security"]).toContain("max-age=31536000");

  const started = await request(app.server).get("/api/sign-in/start");
  expect(cookieOf(started)).toMatch(
    /^__Host-stillneedle-sign-in=[\w-]{43}; Max-Age=600; Path=\/; HttpOnly; Secure; SameSite=Lax$/,
  );

  const account = () =>
    request(app.server)
      .get("/account")
      .set("Cookie", cookie.split(";")[0] ?? "");
  expect((await account()).status).toBe(200);
  const signedOut = await request(app.server)
    .post("/api/sign-out")
    .set("Origin", origin)
    .set("Cookie", cookie.split(";")[0] ?? "");
  // Browsers take no cookie by this prefix without these, its removal included.
  expect(cookieOf(signedOut)).toMatch(/^__Host-stillneedle-session=deleted; .*Path=\/; .*Secure/);
  expect((await account()).status).toBe(303);
});

it("takes no cookie by the plain name", async () => {
  const { cookie } = await newMember(await newOrganisation("Plain Office"), ["planner"]);
  const plain = cookie.replace("__Host-", "");
  expect(plain).not.toBe(cookie);
  expect((await request(app.server).get("/account").set("Cookie", plain)).status).toBe(303);
});
