import { createHash } from "node:crypto";
import { createConnection } from "mysql2/promise";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { db } from "../../src/server/db/client";
import { listActivity } from "../../src/server/db/queries/activity";
import { listDeliveries } from "../../src/server/db/queries/deliveries";
import type { PlanRow } from "../../src/server/db/queries/plans";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newFlaggedPlan, savePlan, signedInBefore } from "../fixtures/revisions";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let planner: SignedInMember;
let auditor: SignedInMember;
let both: SignedInMember;
let plan: PlanRow;
let version: number;

beforeAll(async () => {
  app = await startTestApp();
  const organisation = await newOrganisation("Revision Office");
  planner = await newMember(organisation, ["planner"]);
  auditor = await newMember(organisation, ["auditor"]);
  both = await newMember(organisation, ["planner", "auditor"]);
});
beforeEach(async () => {
  ({ plan, version } = await newFlaggedPlan(planner));
});
afterAll(() => app.close());

const revisions = () => `/api/plans/${plan.id}/revisions`;
const submit = (member = planner, more: object = {}) =>
  as(app, member)("post", revisions()).send({ version, note: "First state.", ...more });
const submitted = async (member = planner): Promise<string> => {
  const answer = await submit(member);
  expect(answer.body).toMatchObject({ url: expect.stringContaining("/revisions/") });
  return `${revisions()}/${String(answer.body.id)}`;
};
const decide = (at: string, more: object = {}, member = auditor) =>
  as(app, member)("post", `${at}/decisions`).send({
    sensorId: "near",
    kind: "held",
    reason: "Measure at the dock.",
    ...more,
  });
const state = async (at: string) => (await as(app, planner)("get", at)).body;
const sentenceOf = (letters: string, counts: string, siteName: string) =>
  `I have reviewed revision ${letters} of ${plan.name}, ${siteName}, and release it: ${counts}.`;
const siteName = async () => {
  const page = await as(app, planner)("get", `/sites/${plan.siteId}`);
  return /<h1[^>]*>([^<]*)/.exec(page.text)?.[1]?.trim() ?? "";
};
const release = async (at: string, letters: string, counts: string, member = auditor, more: object = {}) =>
  as(app, member)("post", `${at}/release`).send({
    sentence: sentenceOf(letters, counts, await siteName()),
    name: member.name,
    ...more,
  });
const oneHeld = "1 position released, 0 released under concession, 1 held, 0 not released";
const sha256 = (text: string) => createHash("sha256").update(text).digest("hex");

describe("submitting", () => {
  it("freezes document and result to the byte, with their hashes, and tells the auditors", async () => {
    const at = await submitted();
    const document = (await as(app, planner)("get", `${at}/document.json`)).text;
    const result = (await as(app, planner)("get", `${at}/result.json`)).text;
    await savePlan(planner, plan, 60);
    const { hashes, ...heading } = await state(at);
    expect(heading).toMatchObject({
      letters: "A",
      state: "under-review",
      verdict: "over",
      note: "First state.",
    });
    expect(hashes).toMatchObject({
      documentSha256: sha256(document),
      drawingSha256: null,
      resultSha256: sha256(result),
      sealSha256: sha256(
        `document ${sha256(document)}\ndrawing none\nresult ${sha256(result)}\nengine ${String(heading.engineVersion)}\n`,
      ),
    });
    expect((await as(app, planner)("get", `${at}/document.json`)).text).toBe(document);
    const told = (await listDeliveries(db(), planner.organisationId, 50)).filter(
      ({ kind }) => kind === "revision",
    );
    expect(
      told
        .slice(0, 2)
        .map(({ recipientName }) => recipientName)
        .sort(),
    ).toEqual([auditor.name, both.name].sort());
  });

  it("has one revision of a plan under review, however often it is asked for at the same time", async () => {
    const answers = await Promise.all([submit(), submit(), submit()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
    const { body } = await as(app, planner)("get", revisions());
    expect(body.revisions).toHaveLength(1);
  });

  it("refuses a version that is not the working copy's, and whoever is no planner", async () => {
    await savePlan(planner, plan, 60);
    expect((await submit()).status).toBe(409);
    expect((await submit(auditor)).status).toBe(403);
  });

  it("keeps what it froze from the application itself", async () => {
    await submitted();
    const connection = await createConnection(app.database.appUrl);
    try {
      for (const table of ["revision_contents", "decisions", "revision_comments"]) {
        await expect(connection.query(`delete from ${table}`)).rejects.toThrow(/denied/);
        await expect(connection.query(`update ${table} set revision_id = revision_id`)).rejects.toThrow(
          /denied/,
        );
      }
    } finally {
      await connection.end();
    }
  });
});

describe("deciding", () => {
  it("keeps every decision, and the last one stands", async () => {
    const at = await submitted();
    expect((await decide(at)).status).toBe(201);
    const second = await decide(at, { kind: "not-released", reason: "Too close.", moveTo: "2 m east" });
    expect([second.status, second.body.ordinal]).toEqual([201, 2]);
    expect((await state(at)).positions).toEqual([
      expect.objectContaining({ sensorId: "far", verdict: "within", disposition: "released" }),
      expect.objectContaining({ sensorId: "near", disposition: "not-released", moveTo: "2 m east" }),
    ]);
    const [line] = await listActivity(db(), planner.organisationId, 1);
    expect(line).toMatchObject({ event: "revision.decided", actorName: auditor.name });
  });

  it("needs reasons, a flagged position, and a last day that is not past", async () => {
    const at = await submitted();
    const refused: [object, string][] = [
      [{ reason: " " }, "reason"],
      [{ sensorId: "far" }, "sensorId"],
      [{ sensorId: "nobody" }, "sensorId"],
      [{ kind: "concession", expiresOn: "2020-01-01" }, "expiresOn"],
      [{ kind: "concession", expiresOn: "tomorrow" }, "expiresOn"],
    ];
    for (const [more, path] of refused) {
      const answer = await decide(at, more);
      expect([answer.status, answer.body.error.faults[0].path]).toEqual([422, path]);
    }
  });

  it("takes a concession from a fresh sign-in only, and says the way to one", async () => {
    const at = await submitted();
    const stale = await signedInBefore(auditor, 5 * 60_000 + 1000);
    const refused = await decide(at, { kind: "concession" }, stale);
    expect([refused.status, refused.body.error.code]).toEqual([401, "sign-in.too-old"]);
    const page = at.replace("/api", "");
    expect(refused.body.error.detail.signInAgain).toBe(
      `/api/sign-in/start?fresh=1&returnTo=${encodeURIComponent(page)}`,
    );
    expect((await decide(at, {}, stale)).status).toBe(201);
    const fresh = await signedInBefore(auditor, 4 * 60_000);
    expect((await decide(at, { kind: "concession" }, fresh)).status).toBe(201);
  });
});

describe("four eyes", () => {
  it("lets nobody decide on or release what they edited since the last release", async () => {
    version = await savePlan(both, plan, 110);
    const at = await submitted(planner);
    expect((await decide(at, {}, both)).body.error.code).toBe("permission.own-edit");
    await decide(at);
    expect((await release(at, "A", oneHeld, both)).body.error.code).toBe("permission.own-edit");
    expect((await release(at, "A", oneHeld)).status).toBe(200);
  });

  it("lets nobody release what they submitted", async () => {
    const at = await submitted(both);
    await decide(at);
    expect((await release(at, "A", oneHeld, both)).body.error.code).toBe("permission.own-edit");
  });

  it("counts an edit until a revision that holds it is released, a return does not end it", async () => {
    version = await savePlan(both, plan, 110);
    const first = await submitted();
    await as(app, auditor)("post", `${first}/return`).send({ reasons: "Wrong current." });
    version = await savePlan(planner, plan, 120);
    const second = await submitted();
    expect((await decide(second, {}, both)).status).toBe(403);
    await decide(second);
    // Saved while the second is under review: not in it, so not forgotten by its release.
    const kept = await savePlan(planner, plan, 130);
    expect((await release(second, "B", oneHeld)).status).toBe(200);
    version = kept;
    const third = await submitted();
    expect((await decide(third, {}, both)).status).toBe(201);
    expect((await release(third, "C", oneHeld, both)).status).toBe(200);
    expect((await state(second)).state).toBe("superseded");
  });
});

describe("releasing", () => {
  it("needs every decision, the sentence as it now is, the own name and a fresh sign-in", async () => {
    const at = await submitted();
    const waiting = await release(at, "A", oneHeld);
    expect([waiting.status, waiting.body.error.message]).toEqual([
      409,
      expect.stringContaining("Compass, dock 3"),
    ]);
    await decide(at);
    const otherName = await release(at, "A", oneHeld, auditor, { name: "Somebody Else" });
    expect([otherName.status, otherName.body.error.faults[0].path]).toEqual([422, "name"]);
    expect((await release(at, "A", oneHeld.replace("1 held", "2 held"))).status).toBe(409);
    const stale = await signedInBefore(auditor, 6 * 60_000);
    expect((await release(at, "A", oneHeld, stale)).body.error.code).toBe("sign-in.too-old");
    expect((await release(at, "A", oneHeld, planner)).status).toBe(403);
    expect((await release(at, "A", oneHeld)).status).toBe(200);
    expect(await state(at)).toMatchObject({ state: "released", signedName: auditor.name });
    expect((await decide(at)).status).toBe(409);
    expect((await release(at, "A", oneHeld)).status).toBe(409);
  });

  it("happens once, however often it is asked for at the same time", async () => {
    const at = await submitted();
    await decide(at);
    const answers = await Promise.all([release(at, "A", oneHeld), release(at, "A", oneHeld)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });
});

describe("returning and commenting", () => {
  it("gives it back with reasons, tells the planner, and lets the next one be submitted", async () => {
    const at = await submitted();
    expect((await as(app, auditor)("post", `${at}/return`).send({ reasons: "" })).status).toBe(422);
    expect((await as(app, auditor)("post", `${at}/return`).send({ reasons: "Name the riser." })).status).toBe(
      200,
    );
    expect(await state(at)).toMatchObject({ state: "returned", returnReasons: "Name the riser." });
    const [mail] = await listDeliveries(db(), planner.organisationId, 1);
    expect(mail).toMatchObject({ kind: "revision", recipientName: planner.name });
    expect((await submit()).body.letters).toBe("B");
  });

  it("tells the others of a comment, not its author", async () => {
    const at = await submitted();
    const before = (await listDeliveries(db(), planner.organisationId, 200)).length;
    const said = await as(app, auditor)("post", `${at}/comments`).send({
      sensorId: "near",
      text: "Which bracket?",
    });
    expect(said.status).toBe(201);
    const told = await listDeliveries(db(), planner.organisationId, 200);
    const names = told.slice(0, told.length - before).map(({ recipientName }) => recipientName);
    expect(names.sort()).toEqual([both.name, planner.name].sort());
    const page = await as(app, planner)("get", at.replace("/api", ""));
    expect(page.text).toContain("Which bracket?");
  });
});

describe("recomputing", () => {
  it("gives the same bytes with the same engine", async () => {
    const at = await submitted();
    const { status, body } = await as(app, auditor)("post", `${at}/recompute`);
    expect(status).toBe(200);
    expect(body).toMatchObject({ sameBytes: true, largestDifference: 0, changedVerdicts: [] });
  });
});
