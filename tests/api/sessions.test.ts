import { eq } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { accountView } from "../../src/server/auth/account";
import { hashOf } from "../../src/server/auth/secrets";
import { purgeExpired } from "../../src/server/auth/purge";
import { createSession } from "../../src/server/auth/session";
import { mintSignInLink } from "../../src/server/auth/sign-in-links";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { countAttempt } from "../../src/server/db/queries/rate-limits";
import { insertPendingSignIn } from "../../src/server/db/queries/sign-ins";
import { pendingSignIns, rateLimits, sessions, signInLinks } from "../../src/server/db/schema/people";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { startTestApp, type TestApp } from "../support/test-app";

const minuteMs = 60_000;
const ago = (ms: number) => new Date(Date.now() - ms);

let app: TestApp;
let organisation: { id: string; name: string };
let member: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
  organisation = await newOrganisation("Session Office");
});
afterAll(() => app.close());

const cookieName = "stillneedle-session";
const idOf = ({ cookie }: SignedInMember) => hashOf(cookie.slice(cookieName.length + 1));
const sessionRow = async (id: string) => (await db().select().from(sessions).where(eq(sessions.id, id)))[0];
const change = (set: Partial<typeof sessions.$inferInsert>) =>
  db()
    .update(sessions)
    .set(set)
    .where(eq(sessions.id, idOf(member)));
const isSignedIn = async (who = member) => (await as(app, who)("get", "/account")).status === 200;
/** Another browser of the same person. */
async function otherBrowser(who = member): Promise<SignedInMember> {
  return { ...who, cookie: `${cookieName}=${await createSession(db(), who.userId)}` };
}

describe("a session", () => {
  beforeAll(async () => {
    member = await newMember(organisation, ["planner"]);
  });

  it("is kept as the hash of its token", async () => {
    const row = await sessionRow(idOf(member));
    expect(row?.userId).toBe(member.userId);
    expect(JSON.stringify(row)).not.toContain(member.cookie.slice(cookieName.length + 1));
    // Whoever reads the table cannot use what stands there.
    expect(await isSignedIn({ ...member, cookie: `${cookieName}=${idOf(member)}` })).toBe(false);
  });

  it("lives on within 30 minutes of its last use, which is noted", async () => {
    await change({ lastSeenAt: ago(29 * minuteMs) });
    expect(await isSignedIn()).toBe(true);
    expect((await sessionRow(idOf(member)))?.lastSeenAt.getTime()).toBeGreaterThan(Date.now() - minuteMs);
  });

  it("is written to at most once a minute", async () => {
    const lastSeenAt = ago(40_000);
    await change({ lastSeenAt });
    expect(await isSignedIn()).toBe(true);
    expect((await sessionRow(idOf(member)))?.lastSeenAt).toEqual(lastSeenAt);
  });

  it.each([
    ["after 30 minutes without use", { lastSeenAt: ago(30 * minuteMs + 1) }],
    ["12 hours after it began, however busy", { lastSeenAt: ago(1), expiresAt: ago(1) }],
  ])("ends %s, with its row and its cookie", async (_, set) => {
    member = await newMember(organisation, ["planner"]);
    await change(set);
    const answer = await as(app, member)("get", "/account");
    expect([answer.status, answer.headers["location"]]).toEqual([303, "/sign-in?returnTo=%2Faccount"]);
    expect(answer.headers["set-cookie"]?.[0]).toMatch(new RegExp(`^${cookieName}=deleted; .*1970`));
    expect(await sessionRow(idOf(member))).toBeUndefined();
  });

  it("begins with 12 hours to live", async () => {
    const now = new Date();
    const row = await sessionRow(hashOf(await createSession(db(), member.userId, now)));
    expect((row?.expiresAt.getTime() ?? 0) - now.getTime()).toBe(12 * 60 * minuteMs);
  });
});

describe("the purge", () => {
  it("removes what has expired, and nothing that is still of use", async () => {
    const { userId } = await newMember(organisation, ["planner"]);
    const hourMs = 60 * minuteMs;
    const expired = hashOf(await createSession(db(), userId, ago(12 * hourMs + 1000)));
    const living = hashOf(await createSession(db(), userId, ago(11 * hourMs)));
    await mintSignInLink(db(), userId, ago(25 * hourMs));
    await mintSignInLink(db(), userId, ago(23 * hourMs));
    const pending = {
      organisationId: null,
      state: "",
      nonce: "",
      codeVerifier: "",
      returnTo: "/",
      subject: null,
    };
    await insertPendingSignIn(db(), { ...pending, id: hashOf("old"), expiresAt: ago(1) });
    await insertPendingSignIn(db(), { ...pending, id: hashOf("new"), expiresAt: ago(-minuteMs) });
    await countAttempt(db(), "old", ago(3 * hourMs));
    await countAttempt(db(), "new", ago(hourMs));
    await purgeExpired();
    expect([await sessionRow(expired), (await sessionRow(living))?.id]).toEqual([undefined, living]);
    expect(await db().$count(signInLinks)).toBe(1);
    expect((await db().select().from(pendingSignIns)).map(({ id }) => id)).toEqual([hashOf("new")]);
    expect((await db().select().from(rateLimits)).map(({ bucket }) => bucket)).toEqual(["new"]);
  });
});

describe("the account page's list", () => {
  it("shows the living sessions of that person alone and marks this one", async () => {
    member = await newMember(organisation, ["planner", "auditor"]);
    await otherBrowser();
    await createSession(db(), member.userId, ago(31 * minuteMs));
    const view = await accountView(member, idOf(member));
    expect(view).toMatchObject({ name: member.name, roles: ["planner", "auditor"] });
    expect(view.email).toContain("@members.example");
    expect(view.sessions.map(({ isThis }) => isThis).sort()).toEqual([false, true]);
  });
});

describe("signing out", () => {
  beforeAll(async () => {
    member = await newMember(organisation, ["planner"]);
  });

  it("ends this browser's session alone and goes to the front page", async () => {
    const other = await otherBrowser();
    const answer = await as(app, other)("post", "/api/sign-out");
    expect([answer.status, answer.headers["location"]]).toEqual([303, "/"]);
    expect(answer.headers["set-cookie"]?.[0]).toContain("1970");
    expect([await isSignedIn(other), await isSignedIn()]).toEqual([false, true]);
    const [line] = await listActivity(db(), organisation.id, 1);
    expect(line).toMatchObject({ event: "session.ended", actorName: member.name });
  });

  it("everywhere ends every session of that person and of nobody else", async () => {
    const bystander = await newMember(organisation, ["planner"]);
    const other = await otherBrowser();
    expect((await as(app, member)("post", "/api/account/sign-out-everywhere")).status).toBe(303);
    expect([await isSignedIn(), await isSignedIn(other), await isSignedIn(bystander)]).toEqual([
      false,
      false,
      true,
    ]);
    const [line] = await listActivity(db(), organisation.id, 1);
    expect(line).toMatchObject({ event: "session.all-ended", detail: '{"sessions":2}' });
  });

  it("is harmless without a session", async () => {
    expect((await as(app, { ...member, cookie: "" })("post", "/api/sign-out")).status).toBe(303);
  });
});
