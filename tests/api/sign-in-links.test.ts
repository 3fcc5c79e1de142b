import { and, eq } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { hashOf } from "../../src/server/auth/secrets";
import { mintSignInLink } from "../../src/server/auth/sign-in-links";
import { db } from "../../src/server/db/client";
import { findUser } from "../../src/server/db/queries/people";
import { deliveries } from "../../src/server/db/schema/notices";
import { signInLinks } from "../../src/server/db/schema/people";
import { createMember } from "../../src/server/organisations/members";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let organisation: { id: string; name: string };
let member: SignedInMember;
let email: string;

beforeAll(async () => {
  app = await startTestApp();
  organisation = await newOrganisation("Link Office");
  member = await newMember(organisation, ["installer"]);
  email = (await findUser(db(), member.userId))?.email ?? "";
});
afterAll(() => app.close());

const problemOf = (response: Response) =>
  new URL(response.headers.get("location") ?? "", app.origin).searchParams.get("problem");
const tokenOf = (url: string) => new URL(url).searchParams.get("token") ?? "";

const ask = (address: string, visitor = app.visitor()) =>
  visitor.request(`${app.origin}/api/sign-in/link`, {
    method: "POST",
    body: new URLSearchParams({ email: address }),
  });
const useUp = (token: string, more: Record<string, string> = {}, visitor = app.visitor()) =>
  visitor.request(`${app.origin}/api/sign-in/token`, {
    method: "POST",
    body: new URLSearchParams({ token, ...more }),
  });
const mailsFor = (userId: string) =>
  db()
    .select()
    .from(deliveries)
    .where(and(eq(deliveries.kind, "sign-in-link"), eq(deliveries.userId, userId)));

/** What an answer shows to whoever asked, without what differs from request to request. */
async function visible(response: Response) {
  const headers = [...response.headers].filter(([name]) => !["date", "x-request-id"].includes(name));
  return { status: response.status, headers, body: await response.text() };
}

describe("asking for a sign-in link", () => {
  it("is answered alike for an address that is known and one that is not", async () => {
    const known = await visible(await ask(` ${email.toUpperCase()} `));
    const unknown = await visible(await ask("nobody.here@members.example"));
    expect(known).toEqual(unknown);
    expect(known).toMatchObject({ status: 303, body: "" });
    expect(known.headers).toContainEqual(["location", "/sign-in?sent=1"]);
  });

  it("takes as long for the one as for the other", async () => {
    const took = async (address: string) => {
      const startedAtMs = performance.now();
      await ask(address);
      return performance.now() - startedAtMs;
    };
    expect(await took(email)).toBeGreaterThanOrEqual(250);
    expect(await took("nobody.else@members.example")).toBeGreaterThanOrEqual(250);
  });

  it("puts a message without any link into the outbox, one for each organisation, and none for a stranger", async () => {
    const shared = "in.two@members.example";
    const people = [];
    for (const { id } of [organisation, await newOrganisation("Other Link Office")]) {
      const fields = { organisationId: id, name: "In Two", email: shared, roles: ["planner"] as const };
      people.push(await db().transaction((tx) => createMember(tx, fields)));
    }
    const before = await db().$count(deliveries);
    await ask(shared);
    await ask("nobody.at.all@members.example");
    expect(await db().$count(deliveries)).toBe(before + 2);
    for (const userId of people) {
      const [mail, ...more] = await mailsFor(userId);
      expect(more).toEqual([]);
      expect(mail).toMatchObject({ state: "waiting", attempts: 0, recipientId: null });
      const links = await db().select().from(signInLinks).where(eq(signInLinks.userId, userId));
      expect(links).toEqual([]);
    }
  });

  it("takes JSON too, and refuses what is no address", async () => {
    const post = (body: string) =>
      app.visitor().request(`${app.origin}/api/sign-in/link`, {
        method: "POST",
        headers: { "content-type": "application/json" },
        body,
      });
    expect((await post(JSON.stringify({ email: "nobody@members.example" }))).status).toBe(202);
    const refused = await post(JSON.stringify({ email: "nobody" }));
    expect(refused.status).toBe(422);
    expect(await refused.json()).toMatchObject({
      error: { code: "input.refused", faults: [{ path: "email" }] },
    });
    expect(problemOf(await ask("nobody@"))).toBe("address-unusable");
  });

  it("does not take an accent for a plain letter", async () => {
    const before = await db().$count(deliveries);
    await ask(email.replace("members", "mémbers"));
    expect(await db().$count(deliveries)).toBe(before);
  });
});

describe("a sign-in link", () => {
  it("leads to this application and is kept as a hash, for ten minutes", async () => {
    const now = new Date();
    const { url, expiresAt } = await mintSignInLink(db(), member.userId, now);
    expect(url).toMatch(new RegExp(`^${app.origin}/sign-in/link\\?token=[\\w-]{43}$`));
    expect(expiresAt.getTime() - now.getTime()).toBe(600_000);
    const [row] = await db()
      .select()
      .from(signInLinks)
      .where(eq(signInLinks.id, hashOf(tokenOf(url))));
    expect(row).toMatchObject({ userId: member.userId, expiresAt, usedAt: null });
    expect(JSON.stringify(row)).not.toContain(tokenOf(url));
  });

  it("changes nothing by being opened, and signs in when its button is pressed", async () => {
    const { url } = await mintSignInLink(db(), member.userId);
    for (let scans = 0; scans < 3; scans += 1) {
      const scanner = app.visitor();
      const opened = await scanner.request(url);
      expect(opened.status).toBe(200);
      expect(opened.headers.getSetCookie()).toEqual([]);
    }
    const visitor = app.visitor();
    const page = await (await visitor.request(url)).text();
    const token = /name="token" value="([\w-]+)"/.exec(page)?.[1] ?? "";
    const pressed = await useUp(token, {}, visitor);
    expect([pressed.status, pressed.headers.get("location")]).toEqual([303, "/desk"]);
    expect((await visitor.request(`${app.origin}/desk`)).status).toBe(200);
  });

  it("works once", async () => {
    const token = tokenOf((await mintSignInLink(db(), member.userId)).url);
    expect(problemOf(await useUp(token))).toBe(null);
    const again = await useUp(token);
    expect([again.status, problemOf(again)]).toEqual([303, "link-used"]);
    expect(again.headers.getSetCookie()).toEqual([]);
  });

  it("works once even when it is used by many at the same time", async () => {
    const token = tokenOf((await mintSignInLink(db(), member.userId)).url);
    const answers = await Promise.all(Array.from({ length: 12 }, () => useUp(token)));
    expect(answers.filter((answer) => problemOf(answer) === null)).toHaveLength(1);
    expect(answers.filter((answer) => problemOf(answer) === "link-used")).toHaveLength(11);
  });

  it("does not work after ten minutes, nor when it was never made", async () => {
    const tenMinutesAgo = new Date(Date.now() - 600_001);
    const token = tokenOf((await mintSignInLink(db(), member.userId, tenMinutesAgo)).url);
    expect(problemOf(await useUp(token))).toBe("link-expired");
    expect(problemOf(await useUp("never-made"))).toBe("link-unusable");
    expect(problemOf(await useUp(hashOf(token)))).toBe("link-unusable");
  });

  it("goes on to a page of ours only", async () => {
    const use = async (returnTo: string) => {
      const token = tokenOf((await mintSignInLink(db(), member.userId)).url);
      return (await useUp(token, { returnTo })).headers.get("location");
    };
    expect(await use("/account")).toBe("/account");
    expect(await use("https://elsewhere.example/")).toBe("/desk");
    expect(await use("/\\elsewhere.example")).toBe("/desk");
  });
});
