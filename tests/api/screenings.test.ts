import { parse } from "csv-parse/sync";
import { createConnection } from "mysql2/promise";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { PlanDocumentInput } from "../../src/domain/plan-document/plan-document";
import { screeningResultSchema } from "../../src/domain/screening-result";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { listFindings } from "../../src/server/db/queries/findings";
import type { PlanRow } from "../../src/server/db/queries/plans";
import { listScreenings } from "../../src/server/db/queries/screenings";
import { screeningView } from "../../src/server/screenings/screenings";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { screenablePlan } from "../fixtures/screenable-plan";
import { newPlan } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let plan: PlanRow;
let version: number;

beforeAll(async () => {
  app = await startTestApp();
  planner = await newMember(await newOrganisation("Screening Office"), ["planner"]);
});
beforeEach(async () => {
  plan = await newPlan(planner);
  version = 1;
  await save(screenablePlan(plan.name));
});
afterAll(() => app.close());

async function save(document: PlanDocumentInput): Promise<void> {
  const saved = await as(app, planner)("put", `/api/plans/${plan.id}/document`).send({
    baseVersion: version,
    document,
  });
  expect(saved.status).toBe(200);
  version = saved.body.version;
}

const screen = (more: object = {}, member = planner) =>
  as(app, member)("post", `/api/plans/${plan.id}/screenings`).send({ version, ...more });
const stored = () => listScreenings(db(), planner.organisationId, plan.id, 10);

describe("screening a plan", () => {
  it("stores document, hash, engine and result, with a finding for each limit and a line in the log", async () => {
    const answer = await screen();
    expect([answer.status, answer.body.verdict]).toEqual([201, "over"]);
    expect(answer.body.url).toBe(`/plans/${plan.id}/screenings/${String(answer.body.id)}`);
    const view = await screeningView(planner, answer.body.id);
    expect(view.screening).toMatchObject({
      documentVersion: version,
      isCurrent: true,
      screenedByName: planner.name,
      inputHash: view.result.inputHash,
      engineVersion: view.result.engineVersion,
    });
    expect([view.document.name, view.plan.id, view.site.id]).toEqual([plan.name, plan.id, plan.siteId]);
    const findings = await listFindings(db(), planner.organisationId, answer.body.id);
    expect(
      findings.map(({ sensorId, sensorName, verdict, unit }) => [sensorId, sensorName, verdict, unit]),
    ).toEqual([
      ["far", "Bench 7", "within", "T"],
      ["near", "Compass, dock 3", "over", "T"],
    ]);
    const near = view.result.sensors.find(({ id }) => id === "near")?.findings[0];
    expect(findings[1]?.value).toBe(near?.value);
    const [line] = await listActivity(db(), planner.organisationId, 1);
    expect(line).toMatchObject({ event: "plan.screened", subjectId: answer.body.id });
  });

  it("gives the result back byte for byte, the same as a screening that keeps nothing", async () => {
    const { body } = await screen();
    const at = `/api/plans/${plan.id}/screenings/${String(body.id)}`;
    const kept = await as(app, planner)("get", at);
    expect(kept.headers["content-type"]).toBe("application/json; charset=utf-8");
    screeningResultSchema.parse(JSON.parse(kept.text));
    const working = await as(app, planner)("get", `/api/plans/${plan.id}/document`);
    const stateless = await as(app, planner)("post", "/api/screen").send(working.body.document);
    expect(stateless.text).toBe(kept.text);
  });

  it("says so when the working copy has moved on, and marks older screenings", async () => {
    const first = await screen();
    await save(screenablePlan(plan.name, 60));
    const late = await screen({ version: version - 1 });
    expect([late.status, late.body.error.code, late.body.error.detail]).toEqual([
      409,
      "state.conflict",
      { version },
    ]);
    expect((await screeningView(planner, first.body.id)).screening.isCurrent).toBe(false);
    expect(await stored()).toHaveLength(1);
  });

  it("refuses with its path what the engine does not compute, and stores nothing", async () => {
    const document = screenablePlan(plan.name);
    const there: [number, number, number] = [0, 0, 2.8];
    const circuits = document.circuits.map((circuit) => ({
      ...circuit,
      path: [there, [12, 0, 2.8] as typeof there, there],
    }));
    await save({ ...document, circuits });
    const refused = await screen();
    expect([refused.status, refused.body.error.code]).toEqual([422, "document.refused"]);
    expect(refused.body.error.faults[0].path).toBe("circuits[0].path");
    expect(await stored()).toEqual([]);
  });

  it("stores nothing at all when one part of it cannot be stored", async () => {
    const owner = await createConnection(app.database.ownerUrl);
    try {
      await owner.query(
        "create trigger no_findings before insert on findings for each row signal sqlstate '45000' set message_text = 'full'",
      );
      expect((await screen()).status).toBe(500);
      await owner.query("drop trigger no_findings");
    } finally {
      await owner.end();
    }
    expect(await stored()).toEqual([]);
    expect((await screen()).status).toBe(201);
  });

  it("is for planners and auditors of the organisation", async () => {
    const organisation = { id: planner.organisationId, name: "Screening Office" };
    const statuses = await Promise.all(
      (["auditor", "installer", "admin"] as const).map(
        async (role) => (await screen({}, await newMember(organisation, [role], [plan.siteId]))).status,
      ),
    );
    expect(statuses).toEqual([201, 403, 403]);
    const stranger = await newMember(await newOrganisation("Foreign Office"), ["planner"]);
    expect((await screen({}, stranger)).status).toBe(404);
    const { body } = await screen();
    const foreign = await newPlan(planner);
    for (const path of ["", "/positions.csv"]) {
      const own = `/screenings/${String(body.id)}${path}`;
      expect((await as(app, stranger)("get", `/api/plans/${plan.id}${own}`)).status).toBe(404);
      expect((await as(app, planner)("get", `/api/plans/${foreign.id}${own}`)).status).toBe(404);
    }
  });
});

describe("positions.csv", () => {
  it("lists each limit of each position, worst first, with units, and computes nothing", async () => {
    const document = screenablePlan(plan.name);
    const [near, far] = document.sensors;
    if (near === undefined || far === undefined) throw new Error("The fixture has no sensors.");
    await save({ ...document, sensors: [{ ...near, name: '=HYPERLINK("x"), dock 3' }, far] });
    const { body } = await screen();
    const answer = await as(app, planner)(
      "get",
      `/api/plans/${plan.id}/screenings/${String(body.id)}/positions.csv`,
    );
    expect(answer.headers["content-type"]).toBe("text/csv; charset=utf-8; header=present");
    expect(answer.headers["content-disposition"]).toContain("attachment;");
    expect(answer.text.startsWith("\ufeff")).toBe(true);
    const rows: Record<string, string>[] = parse(answer.text, { bom: true, columns: true });
    expect(
      rows.map((row) => [row["Position"], row["Verdict of the position"], row["x (m)"], row["z (m)"]]),
    ).toEqual([
      ['\'=HYPERLINK("x"), dock 3', "over", "6", "2.8"],
      ["Bench 7", "within", "6", "1"],
    ]);
    const { result } = await screeningView(planner, body.id);
    const finding = result.sensors.find(({ id }) => id === "near")?.findings[0];
    expect(Number(rows[0]?.["Value (µT, µT/m or °, see Unit)"])).toBeCloseTo((finding?.value ?? 0) * 1e6, 3);
    expect(rows[0]?.["Unit"]).toBe("µT");
    expect(rows[0]?.["Largest spenders"]).toBe("UPS string A 100.0 %");
  });
});
