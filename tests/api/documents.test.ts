import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { PlanDocument } from "../../src/domain/plan-document/plan-document";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { findPlan, type PlanRow } from "../../src/server/db/queries/plans";
import { storeDrawing } from "../../src/server/drawings/drawings";
import { as } from "../fixtures/api-client";
import { floorPicture } from "../fixtures/images";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newPlan } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let other: SignedInMember;
let plan: PlanRow;

beforeAll(async () => {
  app = await startTestApp();
  const organisation = await newOrganisation("Document Office");
  planner = await newMember(organisation, ["planner"]);
  other = await newMember(organisation, ["planner", "auditor"]);
});
beforeEach(async () => {
  plan = await newPlan(planner);
});
afterAll(() => app.close());

const read = async (member = planner) =>
  (await as(app, member)("get", `/api/plans/${plan.id}/document`)).body;
const save = (baseVersion: number, document: unknown, member = planner) =>
  as(app, member)("put", `/api/plans/${plan.id}/document`).send({ baseVersion, document });
const opened = async (): Promise<PlanDocument> => (await read()).document;

const sensor = (id: string) => ({
  id,
  name: `Compass ${id}`,
  position: [4, 3, 1.1],
  limits: [{ kind: "static", limitT: 2e-6 }],
});

describe("the working copy", () => {
  it("begins as version 1 and gives back what was saved, with defaults filled in", async () => {
    expect(await read()).toMatchObject({
      version: 1,
      savedByName: planner.name,
      document: { name: plan.name },
    });
    const saved = await save(1, { ...(await opened()), sensors: [sensor("s1")] }, other);
    expect([saved.status, saved.body.version]).toEqual([200, 2]);
    expect(await read()).toMatchObject({
      version: 2,
      savedAt: saved.body.savedAt,
      savedByName: other.name,
      document: { sensors: [{ id: "s1", axis: null, limits: [{ id: "1", limitT: 2e-6 }] }] },
    });
  });

  it("answers a save on an older version with the present one and changes nothing", async () => {
    const document = await opened();
    await save(1, { ...document, sensors: [sensor("theirs")] }, other);
    const before = await read();
    const refused = await save(1, { ...document, sensors: [sensor("mine")] });
    expect([refused.status, refused.body.error.code]).toEqual([409, "document.conflict"]);
    expect(refused.body.error.detail).toEqual(before);
    expect(refused.body.error.message).toContain(other.name);
    expect(await read()).toEqual(before);
  });

  it("lets one of two saves win that start from the same version at the same moment", async () => {
    const document = await opened();
    const answers = await Promise.all(
      Array.from({ length: 6 }, (_, index) =>
        save(1, { ...document, sensors: [sensor(`s${String(index)}`)] }, index % 2 ? planner : other),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409, 409, 409]);
    expect((await read()).version).toBe(2);
  });

  it("makes no new version of an equal document, also when the answer to the first save was lost", async () => {
    const document = { ...(await opened()), sensors: [sensor("s1")] };
    const first = await save(1, document);
    for (const base of [1, 2]) {
      const again = await save(base, document);
      expect([again.status, again.body]).toEqual([200, first.body]);
    }
    expect((await read()).version).toBe(2);
  });

  it("refuses what the engine would refuse, each fault with its path, and keeps the old version", async () => {
    const document = { ...(await opened()), wings: 2, sensors: [{ ...sensor("s1"), limits: [] }] };
    const refused = await save(1, document);
    expect([refused.status, refused.body.error.code]).toEqual([422, "document.refused"]);
    expect(refused.body.error.faults.map((fault: { path: string }) => fault.path).sort()).toEqual([
      "sensors[0].limits",
      "wings",
    ]);
    expect((await read()).version).toBe(1);
  });

  it("checks the size before it reads the JSON", async () => {
    const answer = await as(app, planner)("put", `/api/plans/${plan.id}/document`)
      .set("Content-Type", "application/json")
      .send(`{"baseVersion":1,"document":"${"x".repeat(20_000_000)}`);
    expect([answer.status, answer.body.error.code]).toEqual([413, "request.too-large"]);
  });

  it("keeps a document of many megabytes to the byte", async () => {
    const notes = Array.from({ length: 5000 }, (_, index) => ({
      id: `n${String(index)}`,
      at: [index / 7, 1 / 3],
      text: `Ω 測 ${"µ".repeat(1000)}`,
    }));
    const document = { ...(await opened()), drawing: { notes } };
    expect((await save(1, document)).status).toBe(200);
    expect((await opened()).drawing).toEqual({ notes });
  });
});

describe("the drawing of a document", () => {
  const sheet = (drawingId: string) => ({
    sheet: { drawingId, widthPx: 90, heightPx: 60, originPx: [0, 60], metresPerPixel: 0.1, rotationDeg: 0 },
  });

  it("must be one of the plan's", async () => {
    const bytes = await floorPicture(90, 60).png().toBuffer();
    const own = await storeDrawing(planner, plan, { bytes, fileName: "floor.png" });
    const foreign = await storeDrawing(planner, await newPlan(planner), { bytes, fileName: "floor.png" });
    const document = await opened();
    for (const drawingId of [foreign.id, "nowhere", "Überall", crypto.randomUUID()]) {
      const refused = await save(1, { ...document, drawing: sheet(drawingId) });
      expect([refused.status, refused.body.error.faults?.[0]?.path]).toEqual([
        422,
        "drawing.sheet.drawingId",
      ]);
    }
    expect((await save(1, { ...document, drawing: sheet(own.id) })).status).toBe(200);
  });
});

describe("the name", () => {
  it("follows the document into the plan's row and the log", async () => {
    const saved = await save(1, { ...(await opened()), name: "  Level 2, store  " });
    expect(saved.status).toBe(200);
    expect((await opened()).name).toBe("Level 2, store");
    expect((await findPlan(db(), plan.organisationId, plan.id))?.name).toBe("Level 2, store");
    const [line] = await listActivity(db(), plan.organisationId, 1);
    expect(line).toMatchObject({ event: "plan.renamed", subjectId: plan.id, actorName: planner.name });
    expect(JSON.parse(line?.detail ?? "")).toEqual({ from: plan.name, to: "Level 2, store" });
  });

  it("may be neither empty nor another plan's, and a refused save leaves both as they were", async () => {
    const twin = await as(app, planner)("post", `/api/sites/${plan.siteId}/plans`).send({ name: "Twin" });
    expect(twin.status).toBe(201);
    const before = await read();
    for (const name of ["", "Twin"]) {
      const refused = await save(1, { ...before.document, name });
      expect([refused.status, refused.body.error.faults?.[0]?.path]).toEqual([422, "name"]);
    }
    expect(await read()).toEqual(before);
    expect((await findPlan(db(), plan.organisationId, plan.id))?.name).toBe(plan.name);
  });
});

describe("who may", () => {
  it("lets planners save and office roles read", async () => {
    const organisation = { id: planner.organisationId, name: "Document Office" };
    const auditor = await newMember(organisation, ["auditor"]);
    const installer = await newMember(organisation, ["installer"], [plan.siteId]);
    const stranger = await newMember(await newOrganisation("Reading Office"), ["planner"]);
    const document = await opened();
    const get = async (member: SignedInMember) =>
      (await as(app, member)("get", `/api/plans/${plan.id}/document`)).status;
    expect([await get(auditor), await get(installer), await get(stranger)]).toEqual([200, 403, 404]);
    const put = async (member: SignedInMember) => (await save(1, document, member)).status;
    expect([await put(auditor), await put(installer), await put(stranger)]).toEqual([403, 403, 404]);
  });
});
