import { afterAll, beforeEach, describe, expect, it, beforeAll } from "vitest";
import type { Role } from "../../src/domain/roles";
import { hashOf } from "../../src/server/auth/secrets";
import { createSession } from "../../src/server/auth/session";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { rolesOf } from "../../src/server/db/queries/people";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { startTestApp, type TestApp } from "../support/test-app";

const cookieName = "stillneedle-session";
let app: TestApp;
let organisation: { id: string; name: string };
let admin: SignedInMember;
let planner: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
});
beforeEach(async () => {
  organisation = await newOrganisation(`Role Office ${crypto.randomUUID()}`);
  admin = await newMember(organisation, ["admin"]);
  planner = await newMember(organisation, ["planner"]);
});
afterAll(() => app.close());

const change = (by: SignedInMember, of: SignedInMember, roles: readonly string[]) =>
  as(app, by)("put", `/api/organisation/members/${of.userId}/roles`).send({ roles });
const sorted = async (who: SignedInMember) => (await rolesOf(db(), who.userId)).sort();
const isSignedIn = async (who: SignedInMember) => (await as(app, who)("get", "/account")).status === 200;

describe("changing a member's roles", () => {
  it("gives exactly the roles named, once each, and writes it into the log", async () => {
    const answer = await change(admin, planner, ["auditor", "installer", "auditor"]);
    expect([answer.status, answer.body]).toEqual([200, { roles: ["auditor", "installer"] }]);
    expect(await sorted(planner)).toEqual(["auditor", "installer"]);
    const [line] = await listActivity(db(), organisation.id, 1);
    expect(line).toMatchObject({
      event: "member.roles-changed",
      subjectId: planner.userId,
      actorName: admin.name,
    });
    expect(JSON.parse(line?.detail ?? "")).toEqual({ before: ["planner"], after: ["auditor", "installer"] });
  });

  it("ends that person's sessions and nobody else's", async () => {
    const bystander = await newMember(organisation, ["planner"]);
    await change(admin, planner, ["auditor"]);
    expect([await isSignedIn(planner), await isSignedIn(admin), await isSignedIn(bystander)]).toEqual([
      false,
      true,
      true,
    ]);
  });

  it("leaves sessions and log alone when nothing changes", async () => {
    const [before] = await listActivity(db(), organisation.id, 1);
    expect((await change(admin, planner, ["planner"])).status).toBe(200);
    expect(await isSignedIn(planner)).toBe(true);
    expect((await listActivity(db(), organisation.id, 1))[0]).toEqual(before);
  });

  it("gives an admin who changes their own a new session id, and ends their other sessions", async () => {
    const elsewhere = { ...admin, cookie: `${cookieName}=${await createSession(db(), admin.userId)}` };
    const answer = await change(admin, admin, ["admin", "planner"]);
    expect(answer.status).toBe(200);
    const token = /^[^=]+=([\w-]{43});/.exec(answer.headers["set-cookie"]?.[0] ?? "")?.[1] ?? "";
    const renewed = { ...admin, cookie: `${cookieName}=${token}` };
    expect(hashOf(token)).not.toBe(hashOf(admin.cookie.slice(cookieName.length + 1)));
    expect([await isSignedIn(renewed), await isSignedIn(admin), await isSignedIn(elsewhere)]).toEqual([
      true,
      false,
      false,
    ]);
  });

  it("makes nobody auditor by their own hand", async () => {
    const answer = await change(admin, admin, ["admin", "auditor"]);
    expect([answer.status, answer.body.error.code]).toEqual([403, "permission.denied"]);
    expect(await sorted(admin)).toEqual(["admin"]);
    expect(await isSignedIn(admin)).toBe(true);
    const second = await newMember(organisation, ["admin"]);
    expect((await change(second, admin, ["admin", "auditor"])).status).toBe(200);
  });

  it("leaves the organisation its last admin", async () => {
    // An admin of another organisation does not count.
    await newMember(await newOrganisation(`Other ${crypto.randomUUID()}`), ["admin"]);
    const answer = await change(admin, admin, ["planner"]);
    expect([answer.status, answer.body.error.code]).toEqual([409, "state.conflict"]);
    expect(await sorted(admin)).toEqual(["admin"]);
    await newMember(organisation, ["admin"]);
    expect((await change(admin, admin, ["planner"])).status).toBe(200);
  });

  it("leaves an admin when two withdraw each other's role at the same time", async () => {
    const second = await newMember(organisation, ["admin"]);
    const answers = await Promise.all([
      change(admin, second, ["planner"]),
      change(second, admin, ["planner"]),
    ]);
    expect(answers.map(({ status }) => status).filter((status) => status === 200)).toHaveLength(1);
    const admins = [await sorted(admin), await sorted(second)]
      .flat()
      .filter((role: Role) => role === "admin");
    expect(admins).toHaveLength(1);
  });

  it("does not reach a member of another organisation", async () => {
    const stranger = await newMember(await newOrganisation(`Far ${crypto.randomUUID()}`), ["planner"]);
    const answer = await change(admin, stranger, ["admin"]);
    expect([answer.status, await sorted(stranger)]).toEqual([404, ["planner"]]);
  });

  it.each([[[]], [["owner"]], [["admin", "owner"]]])("refuses %j", async (roles) => {
    const answer = await change(admin, planner, roles);
    expect([answer.status, answer.body.error.code]).toEqual([422, "input.refused"]);
    expect(await sorted(planner)).toEqual(["planner"]);
  });
});
