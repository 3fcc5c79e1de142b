import { afterAll, beforeAll, beforeEach, expect, it } from "vitest";
import type { PlanDocumentInput } from "../../src/domain/plan-document/plan-document";
import type { PlanRow } from "../../src/server/db/queries/plans";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { screenablePlan } from "../fixtures/screenable-plan";
import { newPlan } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let plan: PlanRow;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Clamp Office"), ["planner"]);
});
beforeEach(async () => {
  plan = await newPlan(planner);
  const document = screenablePlan(plan.name);
  const [circuit] = document.circuits;
  if (circuit === undefined) throw new Error("The fixture has no circuit.");
  const net: PlanDocumentInput["circuits"] = [{ ...circuit, strayCurrentA: 7 }];
  const loadCases = [{ id: "half", name: "Half", factors: { c1: 0.5 } }];
  const saved = await as(app, planner)("put", `/api/plans/${plan.id}/document`).send({
    baseVersion: 1,
    document: { ...document, circuits: net, loadCases },
  });
  expect(saved.status).toBe(200);
});
afterAll(() => app.close());

/** Across the feed, right-handed about its direction, wide enough that its ends 6 m away hardly count. */
const across = [
  [6, -0.1, 2.7],
  [6, 0.1, 2.7],
  [6, 0.1, 2.9],
  [6, -0.1, 2.9],
];
const ask = (more: object = {}) =>
  as(app, planner)("post", `/api/plans/${plan.id}/clamp-meter`).send({ version: 2, loop: across, ...more });

it("reads the net current of the saved working copy, by load case and sense", async () => {
  const whole = await ask({ loadCaseId: null });
  expect([whole.status, whole.body.alternating]).toEqual([200, []]);
  expect(whole.body.dcA).toBeCloseTo(3.5, 2);
  expect((await ask({ loadCaseId: "half" })).body).toEqual(whole.body);
  expect((await ask({ loop: [...across].reverse() })).body.dcA).toBeCloseTo(-3.5, 2);
});

it("refuses another version, another load case, and a loop through a conductor with its place", async () => {
  const late = await ask({ version: 1 });
  expect([late.status, late.body.error.code, late.body.error.detail]).toEqual([
    409,
    "state.conflict",
    { version: 2 },
  ]);
  const faults = async (more: object): Promise<string[]> => {
    const { status, body } = await ask(more);
    expect(status).toBe(422);
    return body.error.faults.map(
      ({ path, message }: { path: string; message: string }) => `${path}: ${message}`,
    );
  };
  expect(await faults({ loadCaseId: "none" })).toEqual([expect.stringContaining('no load case "none"')]);
  const through = [
    [6, -0.015, 2],
    [6, -0.015, 3],
    [6, 1, 3],
  ];
  expect(await faults({ loop: through })).toEqual([
    expect.stringMatching(
      /^loop\[0\]: this side passes through a conductor of "UPS string A" \(c1\) at \(6, -0\.015/,
    ),
  ]);
  expect(await faults({ loop: across.slice(0, 2) })).toEqual([expect.stringMatching(/^loop: /)]);
});
