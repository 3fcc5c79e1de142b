import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { request } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { eq } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { nodeEntry } from "../../scripts/services/app";
import { db } from "../../src/server/db/client";
import { leaveStatelessPlace, takeStatelessPlace } from "../../src/server/db/queries/screenings";
import { statelessScreenings } from "../../src/server/db/schema/plans";
import { closeScreeningPool } from "../../src/server/screenings/pool";
import { runScreening } from "../../src/server/screenings/run-screening";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { heavyPlan, screenablePlan } from "../fixtures/screenable-plan";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let organisation: { id: string; name: string };
let member: SignedInMember;
const heavy = JSON.stringify(heavyPlan());

beforeAll(async () => {
  app = await startTestApp();
  organisation = await newOrganisation("Stateless Office");
  member = await newMember(organisation, ["installer"]);
});
afterAll(async () => {
  await closeScreeningPool();
  await app.close();
});

const screen = (body: unknown, who = member) => as(app, who)("post", "/api/screen").send(body as object);

const place = (userId: string) => {
  const now = new Date();
  return { userId, runId: crypto.randomUUID(), now, expiresAt: new Date(now.getTime() + 60_000) };
};

/** Whether the person's place is free; only looks, since trying would get in a request's way. */
async function isFree(userId: string): Promise<boolean> {
  const rows = await db().select().from(statelessScreenings).where(eq(statelessScreenings.userId, userId));
  return rows.length === 0;
}

describe("POST /api/screen", () => {
  it("answers with the bytes that the command prints", async () => {
    const folder = mkdtempSync(join(tmpdir(), "screen-"));
    try {
      const file = join(folder, "plan.json");
      writeFileSync(file, JSON.stringify(screenablePlan()));
      const printed = spawnSync(process.execPath, [nodeEntry("screen"), file], { encoding: "utf8" });
      expect([printed.status, printed.stderr]).toEqual([3, ""]);
      const answer = await screen(screenablePlan());
      expect([answer.status, answer.text]).toEqual([200, printed.stdout]);
      expect(answer.headers["content-type"]).toBe("application/json; charset=utf-8");
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  it("refuses a document with every fault and its path", async () => {
    const refused = await screen({ ...screenablePlan(), colour: "red", sensors: [], circuits: "none" });
    expect([refused.status, refused.body.error.code]).toEqual([422, "document.refused"]);
    expect(refused.body.error.faults.map(({ path }: { path: string }) => path).sort()).toEqual([
      "circuits",
      "colour",
    ]);
    expect(await isFree(member.userId)).toBe(true);
  });

  it(
    "tells the first of a flood of faults, of depths and of sizes, and goes on answering",
    { timeout: 60_000 },
    async () => {
      const send = (text: string) =>
        as(app, member)("post", "/api/screen").set("Content-Type", "application/json").send(text);
      const sensor = `{"limits":[${"1,".repeat(1900)}1]}`;
      const flood = await send(`{"sensors":[${Array.from({ length: 5000 }, () => sensor).join(",")}]}`);
      expect([flood.status, flood.body.error.faults.length]).toEqual([422, 201]);
      expect(flood.body.error.faults.at(-1).message).toMatch(/^and at least \d+ more faults/);
      const deep = await send(`{"drawing":${"[".repeat(100_000)}${"]".repeat(100_000)}}`);
      expect([deep.status, deep.body.error.faults[0].message]).toEqual([
        422,
        "is nested deeper than 100 levels",
      ]);
      const long = await send(`{"circuits":[${"{},".repeat(1_000_000)}{}]}`);
      expect(long.body.error.faults).toEqual([
        { path: "circuits", message: "1000001 of them; at most 5000 circuits. Split the plan by area" },
      ]);
      expect((await screen(screenablePlan())).status).toBe(200);
    },
  );

  it("needs an account, JSON, and at most 20 MB", async () => {
    const path = "/api/screen";
    const anonymous = { ...member, cookie: "session=none" };
    expect((await screen(screenablePlan(), anonymous)).status).toBe(401);
    const malformed = as(app, member)("post", path).set("Content-Type", "application/json").send("{");
    expect((await malformed).status).toBe(400);
    const huge = as(app, member)("post", path).set("Content-Type", "application/json");
    // Not JSON either: its size is judged before anything is read of it.
    expect((await huge.send(`{${" ".repeat(20_000_001)}`)).status).toBe(413);
  });

  it("runs one at a time for each person, whichever process has the other one", async () => {
    const other = await newMember(organisation, ["planner"]);
    const elsewhere = place(member.userId);
    expect(await takeStatelessPlace(db(), elsewhere)).toBe(true);
    const busy = await screen(screenablePlan());
    expect([busy.status, busy.body.error.code, busy.headers["retry-after"]]).toEqual([
      429,
      "screening.busy",
      "5",
    ]);
    expect((await screen(screenablePlan(), other)).status).toBe(200);
    await leaveStatelessPlace(db(), member.userId, elsewhere.runId);
    expect((await screen(screenablePlan())).status).toBe(200);
  });

  it("frees the place of a process that ended, once its time is over", async () => {
    const dead = { ...place(member.userId), expiresAt: new Date(Date.now() - 1) };
    expect(await takeStatelessPlace(db(), dead)).toBe(true);
    const next = place(member.userId);
    expect(await takeStatelessPlace(db(), next)).toBe(true);
    await leaveStatelessPlace(db(), member.userId, dead.runId);
    expect(await isFree(member.userId)).toBe(false);
    await leaveStatelessPlace(db(), member.userId, next.runId);
  });

  it("gives up when the caller is gone, and frees their place", async () => {
    const { port } = app.server.address() as AddressInfo;
    const call = request({
      port,
      host: "127.0.0.1",
      path: "/api/screen",
      method: "POST",
      headers: { "content-type": "application/json", cookie: member.cookie, origin: app.origin },
    });
    call.on("error", () => {});
    call.end(heavy);
    await vi.waitFor(async () => expect(await isFree(member.userId)).toBe(false), { timeout: 20_000 });
    call.destroy();
    await vi.waitFor(async () => expect(await isFree(member.userId)).toBe(true), { timeout: 5_000 });
  });

  it("stops what takes too long", async () => {
    await expect(runScreening(heavy, undefined, 50)).rejects.toMatchObject({
      code: "screening.timed-out",
      status: 503,
    });
  });
});
