import { env as variables } from "node:process";
import { afterAll, beforeAll, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { listDrawings } from "../../src/server/db/queries/drawings";
import type { PlanRow } from "../../src/server/db/queries/plans";
import { listObjectKeys } from "../../src/server/storage/objects";
import { as } from "../fixtures/api-client";
import { floorPicture } from "../fixtures/images";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newPlan } from "../fixtures/sites";
import { startStoreProxy, type StoreProxy } from "../fixtures/store-proxy";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let store: StoreProxy;
let planner: SignedInMember;
let plan: PlanRow;

beforeAll(async () => {
  app = await startTestApp();
  store = await startStoreProxy(String(variables["S3_ENDPOINT"]));
  variables["S3_ENDPOINT"] = store.url;
  planner = await newMember(await newOrganisation("Store Office"), ["planner"]);
  plan = await newPlan(planner);
});
afterAll(async () => {
  await app.close();
  await store.close();
});

const upload = async () =>
  as(app, planner)("post", `/api/plans/${plan.id}/drawings`)
    .set("Content-Type", "image/png")
    .send(await floorPicture(90, 60).png().toBuffer());

const kept = async () => ({
  rows: (await listDrawings(db(), plan.organisationId, plan.id)).length,
  keys: (await listObjectKeys("")).sort(),
});

it.each([
  ["image", 0],
  ["thumbnail", 1],
])("keeps neither row nor object when the store refuses the %s", async (_which, number) => {
  const before = await kept();
  store.refusePut(number);
  const answer = await upload();
  expect([answer.status, answer.body.error.code]).toEqual([503, "service.unavailable"]);
  expect(answer.body.error.message).toMatch(/nothing was changed/);
  expect(await kept()).toEqual(before);

  store.letThrough();
  expect((await upload()).status).toBe(201);
  expect((await kept()).rows).toBe(before.rows + 1);
});
