import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { verifyActivity } from "../../src/server/activity/verify";
import { mintSignInLink, redeemSignInLink } from "../../src/server/auth/sign-in-links";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import {
  findByEmail,
  findByIdentity,
  findUser,
  rolesOf,
  siteIdsOf,
} from "../../src/server/db/queries/people";
import { env } from "../../src/server/env";
import { installersOf } from "../../src/server/organisations/assignments";
import { as } from "../fixtures/api-client";
import { giveIdentity } from "../fixtures/identities";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newPlan, newSite } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let organisation: { id: string; name: string };
let admin: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
});
beforeEach(async () => {
  organisation = await newOrganisation(`Members Office ${crypto.randomUUID()}`);
  admin = await newMember(organisation, ["admin"]);
});
afterAll(() => app.close());

const members = "/api/organisation/members";
const remove = (who: SignedInMember, by = admin) => as(app, by)("delete", `${members}/${who.userId}`);
const isSignedIn = async (who: SignedInMember) => (await as(app, who)("get", "/account")).status === 200;

describe("removing a member", () => {
  it("ends sessions, roles, sites, identities and links at once, and leaves their work and name", async () => {
    const planner = await newMember(organisation, ["planner", "admin"]);
    const plan = await newPlan(planner);
    const subject = `gone.${crypto.randomUUID()}`;
    await giveIdentity(planner, subject);
    const { url } = await mintSignInLink(db(), planner.userId);
    const email = (await findUser(db(), planner.userId))?.email ?? "";

    expect((await remove(planner)).status).toBe(204);
    expect(await isSignedIn(planner)).toBe(false);
    expect(await rolesOf(db(), planner.userId)).toEqual([]);
    expect(await findByIdentity(db(), env().oidc.issuer, subject)).toEqual([]);
    expect(await findByEmail(db(), email)).toEqual([]);
    const token = new URL(url).searchParams.get("token") ?? "";
    expect(await redeemSignInLink(db(), token)).toEqual({ problem: "link-unusable" });
    const late = await mintSignInLink(db(), planner.userId);
    const lateToken = new URL(late.url).searchParams.get("token") ?? "";
    expect(await redeemSignInLink(db(), lateToken)).toEqual({ problem: "link-unusable" });
    expect(plan.createdBy).toBe(planner.userId);
    const line = (await listActivity(db(), organisation.id, 50)).find(
      ({ event }) => event === "plan.created",
    );
    expect(line?.actorName).toBe(planner.name);
    expect((await remove(planner)).status).toBe(404);
  });

  it("is not for oneself, and leaves an admin when two remove each other at the same time", async () => {
    expect((await remove(admin)).status).toBe(403);
    const second = await newMember(organisation, ["admin"]);
    const answers = await Promise.all([remove(second, admin), remove(admin, second)]);
    expect(answers.filter(({ status }) => status === 204)).toHaveLength(1);
  });
});

describe("erasing a former member", () => {
  it("overwrites name and address, and the activity log stays whole", async () => {
    const planner = await newMember(organisation, ["planner"]);
    await newPlan(planner);
    const erase = () => as(app, admin)("delete", `/api/organisation/former-members/${planner.userId}`);
    expect((await erase()).status).toBe(404);
    await remove(planner);
    expect((await erase()).status).toBe(204);
    const person = await findUser(db(), planner.userId);
    expect(person?.name).toBe("a former member");
    expect(person?.email).not.toContain("members.example");
    const lines = await listActivity(db(), organisation.id, 50);
    expect(JSON.stringify(lines)).not.toContain(planner.name);
    expect(lines.some(({ actorName }) => actorName === "a former member")).toBe(true);
    expect((await verifyActivity(organisation.id)).faults).toEqual([]);
    expect((await erase()).status).toBe(409);
  });
});

describe("an installer's sites", () => {
  it("are assigned from the person and from the site, and decide at once what is seen", async () => {
    const installer = await newMember(organisation, ["installer"]);
    const [one, two] = [await newSite(admin), await newSite(admin)];
    const sees = async (id: string) => (await as(app, installer)("get", `/sites/${id}`)).status;
    expect(await sees(one.id)).toBe(404);
    const assign = (siteIds: string[]) =>
      as(app, admin)("put", `${members}/${installer.userId}/sites`).send({ siteIds });
    expect((await assign([one.id, one.id])).body).toEqual({ siteIds: [one.id] });
    expect([await sees(one.id), await sees(two.id)]).toEqual([200, 404]);
    const staff = (userIds: string[]) =>
      as(app, admin)("put", `/api/sites/${two.id}/installers`).send({ userIds });
    expect((await staff([installer.userId])).status).toBe(200);
    expect((await siteIdsOf(db(), installer.userId)).sort()).toEqual([one.id, two.id].sort());
    expect(await installersOf(admin, two.id)).toMatchObject([{ userId: installer.userId, isAssigned: true }]);
    await staff([]);
    expect(await siteIdsOf(db(), installer.userId)).toEqual([one.id]);
    expect((await staff([admin.userId])).status).toBe(422);
    expect((await assign([crypto.randomUUID()])).status).toBe(422);
  });
});

describe("archiving", () => {
  it("needs the name, hides the site with its plans, and is undone by restoring", async () => {
    const planner = await newMember(organisation, ["planner"]);
    const plan = await newPlan(planner);
    const site = `/api/sites/${plan.siteId}`;
    const { body } = await as(app, admin)("patch", site).send({ place: "Harbour Road 6" });
    const archive = (name: string) => as(app, admin)("post", `${site}/archive`).send({ name });
    const wrong = await archive("Something else");
    expect([wrong.status, wrong.body.error.faults[0].path]).toEqual([422, "name"]);
    expect((await archive((body as { name: string }).name)).status).toBe(204);
    const seen = async () => (await as(app, planner)("get", `/plans/${plan.id}`)).status;
    expect(await seen()).toBe(404);
    const restore = () =>
      as(app, admin)("post", `/api/organisation/archive/sites/${plan.siteId}/restore`).send({});
    expect((await restore()).status).toBe(204);
    expect(await seen()).toBe(200);
    expect((await restore()).status).toBe(404);

    const one = `/api/plans/${plan.id}`;
    expect((await as(app, admin)("post", `${one}/archive`).send({ name: plan.name })).status).toBe(204);
    expect(await seen()).toBe(404);
    await as(app, admin)("post", `/api/organisation/archive/plans/${plan.id}/restore`).send({});
    expect(await seen()).toBe(200);
  });
});
