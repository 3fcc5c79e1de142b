import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import type { SiteRow } from "../../src/server/db/queries/sites";
import { deskFor } from "../../src/server/desk/desk";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newSite } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let site: SiteRow;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Plan Office"), ["planner"]);
});
beforeEach(async () => {
  site = await newSite(planner);
});
afterAll(() => app.close());

const create = (name: unknown, member = planner) =>
  as(app, member)("post", `/api/sites/${site.id}/plans`).send({ name });
const documentOf = async (planId: string) =>
  (await as(app, planner)("get", `/api/plans/${planId}/document`)).body;

describe("creating a plan", () => {
  it("makes an empty document that takes the Earth's field from the site's place and today", async () => {
    const answer = await create(" Level 1 ");
    expect([answer.status, answer.body.url]).toEqual([201, `/plans/${String(answer.body.id)}`]);
    const today = new Intl.DateTimeFormat("sv-SE", { timeZone: site.timeZone }).format(new Date());
    expect(await documentOf(answer.body.id)).toMatchObject({
      version: 1,
      savedByName: planner.name,
      document: {
        name: "Level 1",
        circuits: [],
        earthField: { mode: "model", latitudeDeg: 54.2, longitudeDeg: 7.9, altitudeM: 10, date: today },
      },
    });
    const [line] = await listActivity(db(), planner.organisationId, 1);
    expect(line).toMatchObject({ event: "plan.created", subjectId: answer.body.id, actorName: planner.name });
  });

  it("leaves the Earth's field out where nobody has said where on earth the site is", async () => {
    await as(app, planner)("patch", `/api/sites/${site.id}`).send({ latitudeDeg: null, longitudeDeg: null });
    const { body } = await create("Level 1");
    expect((await documentOf(body.id)).document.earthField).toBeNull();
  });

  it("refuses a name that is empty, too long, or another plan's of the site", async () => {
    expect((await create("Level 1")).status).toBe(201);
    for (const name of ["Level 1", "  ", "x".repeat(201), "two\nlines"]) {
      const refused = await create(name);
      expect([refused.status, refused.body.error.faults?.[0]?.path]).toEqual([422, "name"]);
    }
    const { sites } = await deskFor(planner);
    expect(sites.find(({ id }) => id === site.id)?.plans.map(({ name }) => name)).toEqual(["Level 1"]);
  });

  it("is for planners of the organisation", async () => {
    const organisation = { id: planner.organisationId, name: "Plan Office" };
    const auditor = await newMember(organisation, ["auditor"]);
    const admin = await newMember(organisation, ["admin"]);
    const stranger = await newMember(await newOrganisation("Foreign Office"), ["planner"]);
    const statuses = await Promise.all(
      [auditor, admin, stranger].map(async (member) => (await create("Mine", member)).status),
    );
    expect(statuses).toEqual([403, 403, 404]);
  });
});

describe("renaming a plan", () => {
  it("renames the document with it, as a new version", async () => {
    const { body } = await create("Level 1");
    const renamed = await as(app, planner)("patch", `/api/plans/${String(body.id)}`).send({
      name: "Ground floor",
    });
    expect([renamed.status, renamed.body]).toEqual([200, { version: 2 }]);
    expect(await documentOf(body.id)).toMatchObject({ version: 2, document: { name: "Ground floor" } });
  });

  it("refuses another plan's name and keeps its own in both places", async () => {
    const { body } = await create("Level 1");
    await create("Level 2");
    const refused = await as(app, planner)("patch", `/api/plans/${String(body.id)}`).send({
      name: "Level 2",
    });
    expect([refused.status, refused.body.error.faults[0].path]).toEqual([422, "name"]);
    expect(await documentOf(body.id)).toMatchObject({ version: 1, document: { name: "Level 1" } });
  });
});
