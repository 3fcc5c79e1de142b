import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { findSite, listContacts } from "../../src/server/db/queries/sites";
import { deskFor } from "../../src/server/desk/desk";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newSite, siteFields } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

const organisationName = "Site Office";
let app: TestApp;
let organisation: { id: string; name: string };
let planner: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
  organisation = await newOrganisation(organisationName);
  planner = await newMember(organisation, ["planner"]);
});
afterAll(() => app.close());

const siteOf = (id: string, organisationId = organisation.id) => findSite(db(), organisationId, id);
const firstFault = (body: { error: { faults?: { path: string }[] } }) => body.error.faults?.[0]?.path;

describe("a site", () => {
  it("is created with its place on earth and written into the log", async () => {
    const answer = await as(app, planner)("post", "/api/sites").send({
      ...siteFields,
      name: " Quayside store ",
    });
    expect([answer.status, answer.body.url]).toEqual([201, `/sites/${String(answer.body.id)}`]);
    expect(await siteOf(answer.body.id)).toMatchObject({ ...siteFields, organisationId: organisation.id });
    const [line] = await listActivity(db(), organisation.id, 1);
    expect(line).toMatchObject({ event: "site.created", subjectId: answer.body.id, actorName: planner.name });
  });

  it.each([
    ["name", { name: " " }],
    ["place", { place: "x".repeat(201) }],
    ["timeZone", { timeZone: "Europe/Quillhaven" }],
    ["timeZone", { timeZone: "CET+1" }],
    ["latitudeDeg", { latitudeDeg: 90.1 }],
    ["longitudeDeg", { longitudeDeg: -181 }],
    ["longitudeDeg", { longitudeDeg: null }],
    ["altitudeM", { altitudeM: 20_000 }],
    ["phaseLabels", { phaseLabels: "L1/L2" }],
    ["phaseLabels", { phaseLabels: "R/S/R" }],
  ])("is refused for its %s in %o", async (path, part) => {
    const body = { ...siteFields, name: `Refused ${crypto.randomUUID()}`, ...part };
    const refused = await as(app, planner)("post", "/api/sites").send(body);
    expect([refused.status, firstFault(refused.body)]).toEqual([422, path]);
  });

  it("changes in what is named alone, and the log says from what to what", async () => {
    const site = await newSite(planner);
    const change = { altitudeM: 25, phaseLabels: "R / S / T", place: site.place };
    const answer = await as(app, planner)("patch", `/api/sites/${site.id}`).send(change);
    expect(answer.status).toBe(200);
    expect(await siteOf(site.id)).toEqual({ ...site, altitudeM: 25, phaseLabels: "R/S/T" });
    const [line] = await listActivity(db(), organisation.id, 1);
    expect(line).toMatchObject({ event: "site.changed", subjectId: site.id });
    expect(JSON.parse(line?.detail ?? "")).toEqual({
      from: { altitudeM: 10, phaseLabels: "L1/L2/L3" },
      to: { altitudeM: 25, phaseLabels: "R/S/T" },
    });
  });

  it("keeps its name apart from the other sites of the organisation, not of another", async () => {
    const taken = (await newSite(planner)).name;
    const site = await newSite(planner);
    const refused = await as(app, planner)("patch", `/api/sites/${site.id}`).send({ name: taken });
    expect([refused.status, firstFault(refused.body)]).toEqual([422, "name"]);
    expect(await siteOf(site.id)).toEqual(site);
    const stranger = await newMember(await newOrganisation("Namesake Office"), ["planner"]);
    const theirs = await as(app, stranger)("post", "/api/sites").send({ ...siteFields, name: taken });
    expect(theirs.status).toBe(201);
  });

  it("never has a latitude without a longitude", async () => {
    const site = await newSite(planner);
    const refused = await as(app, planner)("patch", `/api/sites/${site.id}`).send({ longitudeDeg: null });
    expect([refused.status, firstFault(refused.body)]).toEqual([422, "longitudeDeg"]);
    expect(await siteOf(site.id)).toEqual(site);
  });
});

describe("people to notify", () => {
  const contact = { name: "Ilka Brandvold", email: "Ilka@Quillhaven.example", duty: "Mounts sensors" };

  it("are added once each and removed, and the log names no address", async () => {
    const site = await newSite(planner);
    const path = `/api/sites/${site.id}/contacts`;
    const added = await as(app, planner)("post", path).send(contact);
    expect(added.status).toBe(201);
    const twice = await as(app, planner)("post", path).send({ ...contact, email: "ilka@quillhaven.example" });
    expect([twice.status, firstFault(twice.body)]).toEqual([422, "email"]);
    const [row, ...more] = await listContacts(db(), organisation.id, site.id);
    expect(row).toMatchObject({ id: added.body.id, email: "ilka@quillhaven.example" });
    expect(more).toEqual([]);

    expect((await as(app, planner)("delete", `${path}/${String(added.body.id)}`)).status).toBe(204);
    expect(await listContacts(db(), organisation.id, site.id)).toEqual([]);
    const lines = await listActivity(db(), organisation.id, 2);
    expect(lines.map(({ event }) => event)).toEqual(["contact.removed", "contact.added"]);
    expect(JSON.stringify(lines)).not.toContain("quillhaven.example");
  });

  it.each([
    ["email", { email: "ilka@" }],
    ["email", { email: "ilka@quillhaven.example\r\nBcc: all@quillhaven.example" }],
    ["name", { name: "" }],
    ["name", { name: "Ilka\nBrandvold" }],
    ["duty", { duty: " " }],
  ])("are refused for their %s in %o", async (path, part) => {
    const site = await newSite(planner);
    const refused = await as(app, planner)("post", `/api/sites/${site.id}/contacts`).send({
      ...contact,
      ...part,
    });
    expect([refused.status, firstFault(refused.body)]).toEqual([422, path]);
  });

  it("are out of reach through another site", async () => {
    const [one, two] = [await newSite(planner), await newSite(planner)];
    const { body } = await as(app, planner)("post", `/api/sites/${one.id}/contacts`).send(contact);
    const path = `/api/sites/${two.id}/contacts/${String(body.id)}`;
    expect((await as(app, planner)("delete", path)).status).toBe(404);
    expect(await listContacts(db(), organisation.id, one.id)).toHaveLength(1);
  });
});

describe("who sees and changes a site", () => {
  it("shows an installer the sites that they are assigned to, without plans", async () => {
    const [one, two] = [await newSite(planner), await newSite(planner)];
    await as(app, planner)("post", `/api/sites/${one.id}/plans`).send({ name: "Level 1" });
    const installer = await newMember(organisation, ["installer"], [one.id]);
    expect((await deskFor(installer)).sites).toEqual([
      { id: one.id, name: one.name, place: one.place, timeZone: one.timeZone, plans: [] },
    ]);
    const nowhere = await newMember(organisation, ["installer"]);
    expect((await deskFor(nowhere)).sites).toEqual([]);
    const seen = (await deskFor(planner)).sites;
    expect(seen.map(({ id }) => id)).toEqual(expect.arrayContaining([one.id, two.id]));
    expect(seen.find(({ id }) => id === one.id)?.plans).toMatchObject([
      { name: "Level 1", verdict: null, flaggedCount: 0, screeningId: null, changedSinceScreening: false },
    ]);
  });

  it("lets planners and admins change it, and answers 404 to other organisations", async () => {
    const site = await newSite(planner);
    const members = [
      await newMember(organisation, ["admin"]),
      await newMember(organisation, ["auditor"]),
      await newMember(organisation, ["installer"], [site.id]),
      await newMember(organisation, ["installer"]),
      await newMember(await newOrganisation("Stranger Office"), ["planner", "admin"]),
    ];
    const statuses = [];
    for (const member of members)
      statuses.push((await as(app, member)("patch", `/api/sites/${site.id}`).send({ altitudeM: 1 })).status);
    expect(statuses).toEqual([200, 403, 403, 404, 404]);
  });
});
