import { afterAll, beforeAll, beforeEach, expect, it } from "vitest";
import { calendarDay } from "../../src/domain/decision";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { listDeliveries } from "../../src/server/db/queries/deliveries";
import { findSite } from "../../src/server/db/queries/sites";
import { keepConcessions } from "../../src/server/revisions/concessions";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newFlaggedPlan } from "../fixtures/revisions";
import { newContact } from "../fixtures/walkers";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let auditor: SignedInMember;
let at: string;
let lastDay: string;

const dayMs = 24 * 60 * 60_000;
const inDays = (days: number) => new Date(Date.now() + days * dayMs);

beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.close());

/** A released revision with a concession that ends in 60 days, on a site with one contact. */
beforeEach(async () => {
  const organisation = await newOrganisation(`Concession Office ${crypto.randomUUID()}`);
  planner = await newMember(organisation, ["planner"]);
  auditor = await newMember(organisation, ["auditor"]);
  const { plan, version } = await newFlaggedPlan(planner);
  await newContact(planner, plan.siteId);
  const submitted = await as(app, planner)("post", `/api/plans/${plan.id}/revisions`).send({ version });
  at = `/api/plans/${plan.id}/revisions/${String(submitted.body.id)}`;
  lastDay = calendarDay(inDays(60), "Europe/Berlin");
  const decision = {
    sensorId: "near",
    kind: "concession",
    reason: "Low duty until spring.",
    expiresOn: lastDay,
  };
  expect((await as(app, auditor)("post", `${at}/decisions`).send(decision)).status).toBe(201);
  const site = await findSite(db(), planner.organisationId, plan.siteId);
  const sentence = `I have reviewed revision A of ${plan.name}, ${String(site?.name)}, and release it: 1 position released, 1 released under concession, 0 held, 0 not released.`;
  const released = await as(app, auditor)("post", `${at}/release`).send({ sentence, name: auditor.name });
  expect(released.status).toBe(200);
});

const near = async () =>
  (await as(app, planner)("get", at)).body.positions.find(
    ({ sensorId }: { sensorId: string }) => sensorId === "near",
  );
const told = async () =>
  (await listDeliveries(db(), planner.organisationId, 100)).map(({ recipientName }) => recipientName);

it("tells planner and auditor 30 and 7 days before, once each", async () => {
  const before = (await told()).length;
  const since = async () => (await told()).slice(0, (await told()).length - before).sort();
  await keepConcessions(inDays(20));
  expect(await since()).toEqual([]);
  await Promise.all([keepConcessions(inDays(31)), keepConcessions(inDays(31))]);
  const both = [auditor.name, planner.name];
  expect(await since()).toEqual(both.sort());
  await keepConcessions(inDays(40));
  expect(await since()).toHaveLength(2);
  await keepConcessions(inDays(54));
  await keepConcessions(inDays(55));
  expect(await since()).toEqual([...both, ...both].sort());
  expect(await near()).toMatchObject({ disposition: "concession", expiresOn: lastDay });
});

it("turns into held after its last day, once, and says so to the site's people too", async () => {
  const before = (await told()).length;
  await keepConcessions(inDays(60));
  expect(await near()).toMatchObject({ disposition: "concession" });
  const afterReminder = (await told()).length;
  expect(afterReminder - before).toBe(2);
  await Promise.all([keepConcessions(inDays(62)), keepConcessions(inDays(62))]);
  expect(await near()).toMatchObject({ disposition: "held", expiresOn: null });
  const names = await told();
  expect(names.slice(0, names.length - afterReminder).sort()).toEqual(
    [auditor.name, planner.name, "Site office"].sort(),
  );
  const [line] = await listActivity(db(), planner.organisationId, 1);
  expect(line).toMatchObject({ event: "concession.ended", actorName: null });
});
