import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { clearingSchema } from "../../src/domain/clearing";
import { parsePlanDocument } from "../../src/domain/plan-document/parse";
import type { PlanRow } from "../../src/server/db/queries/plans";
import { clearing } from "../../src/screening/clearing/clearing";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { screenablePlan } from "../fixtures/screenable-plan";
import { newPlan } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let plan: PlanRow;
let api: string;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Clearing Office"), ["planner"]);
  plan = await newPlan(planner);
  const saved = await as(app, planner)("put", `/api/plans/${plan.id}/document`).send({
    baseVersion: 1,
    document: screenablePlan(plan.name),
  });
  const { version } = saved.body as { version: number };
  const screened = await as(app, planner)("post", `/api/plans/${plan.id}/screenings`).send({ version });
  api = `/api/plans/${plan.id}/screenings/${String(screened.body.id)}/clearing`;
});
afterAll(() => app.close());

const ask = async (query = "") => (await as(app, planner)("get", `${api}${query}`)).body as unknown;

describe("what would clear a screening", () => {
  it("is what the engine says of the stored document, to the last digit", async () => {
    const parsed = parsePlanDocument(screenablePlan(plan.name));
    if (!parsed.ok) throw new Error("The fixture is refused.");
    const parts = ["positions", "currents", "changes", "distances"] as const;
    const expected = clearing(parsed.document, { sensorIds: null, parts: [...parts] });
    const answer = clearingSchema.parse(await ask());
    expect(answer).toEqual(expected);
    expect(answer.sensors.map(({ id, verdict }) => [id, verdict])).toEqual([["near", "over"]]);
    expect(answer.sensors[0]?.positions?.suggestions.length).toBeGreaterThan(0);
    expect(answer.changes.length).toBeGreaterThan(0);
  });

  it("is given for one position, and by parts", async () => {
    const one = clearingSchema.parse(await ask("?position=near"));
    expect([one.sensors.length, one.distances]).toEqual([1, null]);
    expect(clearingSchema.parse(await ask("?position=far")).sensors).toEqual([]);
    const distances = clearingSchema.parse(await ask("?part=distances"));
    expect(distances.sensors[0]).toMatchObject({ positions: null, currents: [] });
    expect(distances.changes).toEqual([]);
    expect(distances.distances?.circuits.map(({ circuitId }) => circuitId)).toEqual(["c1"]);
  });

  it("refuses a part that does not exist", async () => {
    const refused = await as(app, planner)("get", `${api}?part=everything`);
    expect([refused.status, refused.body.error.code]).toEqual([422, "input.refused"]);
  });
});
