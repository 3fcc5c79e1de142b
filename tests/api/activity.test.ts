import { createConnection } from "mysql2/promise";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { recordActivity } from "../../src/server/activity/record";
import { verifyActivity } from "../../src/server/activity/verify";
import { verifyLogs } from "../../src/server/activity/verify-logs";
import { db } from "../../src/server/db/client";
import { findHead, listActivity } from "../../src/server/db/queries/activity";
import { as } from "../fixtures/api-client";
import { newMember, newOrganisation, type SignedInMember } from "../fixtures/organisation";
import { newSite } from "../fixtures/sites";
import { startTestApp, type TestApp } from "../support/test-app";

let app: TestApp;
let organisation: { id: string; name: string };
let auditor: SignedInMember;

beforeAll(async () => {
  app = await startTestApp();
});
beforeEach(async () => {
  organisation = await newOrganisation(`Logged ${crypto.randomUUID()}`);
  auditor = await newMember(organisation, ["auditor", "admin"]);
});
afterAll(() => app.close());

const deed = (detail: Record<string, unknown> = {}) =>
  db().transaction((tx) =>
    recordActivity(tx, {
      organisationId: organisation.id,
      actorId: auditor.userId,
      event: "site.changed",
      subjectKind: "site",
      subjectId: null,
      detail,
    }),
  );

/** What only somebody with the database's owner at hand can do. */
async function tamper(statement: string, ...values: unknown[]): Promise<void> {
  const connection = await createConnection({ uri: app.database.ownerUrl });
  try {
    await connection.query(statement, values);
  } finally {
    await connection.end();
  }
}
const faults = async () => (await verifyActivity(organisation.id)).faults;

describe("the activity log", () => {
  it("is one strict chain however many write at once", async () => {
    await Promise.all(Array.from({ length: 24 }, (_, place) => deed({ place })));
    const lines = await listActivity(db(), organisation.id, 100);
    expect(lines.map(({ sequence }) => sequence)).toEqual(Array.from({ length: 25 }, (_, at) => 25 - at));
    expect(await verifyActivity(organisation.id)).toMatchObject({
      lines: 25,
      faults: [],
      head: lines[0]?.hash,
    });
    expect(await findHead(db(), organisation.id)).toEqual({ sequence: 25, hash: lines[0]?.hash });
  });

  it("keeps no line of a deed that was taken back", async () => {
    const before = await findHead(db(), organisation.id);
    await expect(
      db().transaction(async (tx) => {
        await recordActivity(tx, {
          organisationId: organisation.id,
          actorId: null,
          event: "site.changed",
          subjectKind: "site",
          subjectId: null,
        });
        throw new Error("taken back");
      }),
    ).rejects.toThrow("taken back");
    expect(await findHead(db(), organisation.id)).toEqual(before);
    await deed();
    expect(await faults()).toEqual([]);
  });

  it("betrays a line that was changed, removed or exchanged, and a log that was cut off", async () => {
    for (const place of [2, 3, 4, 5]) await deed({ place });
    const of = "where organisation_id = ? and sequence = ?";
    await tamper(`update activity_log set detail = '{"place":9}' ${of}`, organisation.id, 2);
    expect(await faults()).toEqual([expect.stringMatching(/^line 2 .*was changed/)]);
    await tamper(`update activity_log set detail = '{"place":2}' ${of}`, organisation.id, 2);
    expect(await faults()).toEqual([]);
    for (const [from, to] of [
      [3, 99],
      [4, 3],
      [99, 4],
    ])
      await tamper(`update activity_log set sequence = ? ${of}`, to, organisation.id, from);
    expect((await faults()).join("\n")).toMatch(/line 3 .*was changed[^]*line 4 .*was changed/);
    await tamper(`delete from activity_log ${of}`, organisation.id, 5);
    expect((await faults()).at(-1)).toBe("line 5 is missing");
  });

  it("says at which line a head stands that was noted earlier", async () => {
    const noted = (await findHead(db(), organisation.id))?.hash ?? "";
    await deed();
    const slug = organisation.name.toLowerCase().replace(" ", "-");
    const found = await verifyLogs(slug, noted.slice(0, 20));
    expect([found.isWhole, found.report.join("\n")]).toEqual([
      true,
      expect.stringContaining("that of line 1"),
    ]);
    const lost = await verifyLogs(slug, "0123456789abcdef");
    expect([lost.isWhole, lost.report.join("\n")]).toEqual([false, expect.stringContaining("at no line")]);
    await expect(verifyLogs("nobody")).rejects.toThrow("no organisation");
  });
});

describe("reading the log", () => {
  it("filters page and CSV alike, and hands out the hashes", async () => {
    const site = await newSite(auditor);
    await deed({ name: "=SUM(A1)" });
    const csv = async (query: string) =>
      (await as(app, auditor)("get", `/api/organisation/activity.csv${query}`)).text.trim().split("\r\n");
    const all = await csv("");
    expect(all).toHaveLength(4);
    expect(all[1]).toContain("member.added");
    const head = await findHead(db(), organisation.id);
    expect(all[3]).toContain(head?.hash);
    expect(await csv(`?event=site.created&subjectId=${site.id}&actor=${auditor.userId}`)).toHaveLength(2);
    expect(await csv("?actor=service&event=&from=&to=")).toHaveLength(2);
    expect(await csv("?to=2020-01-01")).toHaveLength(1);
    const page = async (query: string) =>
      (await as(app, auditor)("get", `/organisation/activity${query}`)).text;
    expect(await page("?event=site.created")).toContain(site.name);
    expect(await page("?event=member.removed")).toContain("No line matches");
    expect(await page("?event=nonsense")).toContain("cannot be used");
    expect((await as(app, auditor)("get", "/api/organisation/activity.csv?event=nonsense")).status).toBe(422);
    const planner = await newMember(organisation, ["planner"]);
    expect((await as(app, planner)("get", "/organisation/activity")).status).toBe(403);
  });
});
