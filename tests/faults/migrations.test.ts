import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { drizzle } from "drizzle-orm/mysql2";
import { migrate } from "drizzle-orm/mysql2/migrator";
import { createConnection, type RowDataPacket } from "mysql2/promise";
import { afterAll, beforeAll, beforeEach, expect, test } from "vitest";
import { generateSecrets } from "../../scripts/services/local-environment";
import { startMariaDb, type MariaDb } from "../../scripts/services/mariadb";
import { freePortBlock } from "../../scripts/services/ports";
import { inRepository } from "../../scripts/services/repository";
import { ChainCheck, type ChainHead, type StoredLine } from "../../src/server/activity/chain";
import { applyMigrations } from "../../src/server/db/migrations/apply-migrations";

const name = "stillneedle_test_migrations";
let folder: string;
let mariaDb: MariaDb;
let ownerUrl: string;
let appUrl: string;

async function query(url: string, ...statements: string[]): Promise<RowDataPacket[]> {
  const connection = await createConnection({ uri: url, timezone: "Z" });
  try {
    let rows: RowDataPacket[] = [];
    for (const statement of statements) [rows] = await connection.query<RowDataPacket[]>(statement);
    return rows;
  } finally {
    await connection.end();
  }
}

const apply = (migrationsFolder = inRepository("drizzle"), lockTimeoutS = 60) =>
  applyMigrations({ ownerUrl, appUrl, migrationsFolder, lockTimeoutS });

/** The tables alone, as an older version would have left them. */
async function migrateOnly(migrationsFolder: string): Promise<void> {
  const connection = await createConnection({ uri: ownerUrl });
  try {
    await migrate(drizzle(connection), { migrationsFolder });
  } finally {
    await connection.end();
  }
}

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), "migrations-"));
  const { rootPassword: root, ownerPassword: owner, appPassword: app } = generateSecrets();
  mariaDb = await startMariaDb({
    dataFolder: join(folder, "mariadb"),
    port: await freePortBlock(1),
    passwords: { root, owner, app },
    databasePattern: "stillneedle\\_test%",
  });
  ownerUrl = mariaDb.ownerUrl(name);
  appUrl = mariaDb.appUrl(name);
});

afterAll(async () => {
  await mariaDb.stop();
  rmSync(folder, { recursive: true });
});

beforeEach(async () => {
  await query(mariaDb.ownerUrl(""), `drop database if exists ${name}`, `create database ${name}`);
});

test("every migration is applied once", async () => {
  const { entries } = JSON.parse(readFileSync(inRepository("drizzle/meta/_journal.json"), "utf8")) as {
    entries: unknown[];
  };
  expect(await apply()).toBe(entries.length);
  expect(await apply()).toBe(0);
});

test("the application's user reads and writes, but neither changes nor empties the activity log", async () => {
  await apply();
  await query(
    appUrl,
    "select * from activity_log",
    "delete from organisations",
    "update users set name = 'x'",
  );
  for (const forbidden of [
    "update activity_log set action = 'x'",
    "delete from activity_log",
    "truncate table activity_log",
    "drop table activity_log",
    "alter table organisations add column more int",
  ]) {
    await expect(query(appUrl, forbidden)).rejects.toThrow(/denied/);
  }
});

test("an application's user with rights on the whole database is refused", async () => {
  // The owner may pass on what it has: the rights on the pattern of names.
  const everything = "`stillneedle\\_test%`.*";
  await query(ownerUrl, `grant update on ${everything} to 'stillneedle_app'@'127.0.0.1'`);
  await expect(apply()).rejects.toMatchObject({
    kind: "rights",
    message: expect.stringMatching(/could change the activity log.*Revoke/) as string,
  });
  await query(ownerUrl, `revoke update on ${everything} from 'stillneedle_app'@'127.0.0.1'`);
});

test("a database of a newer version is refused and left as it is", async () => {
  await apply();
  await query(
    ownerUrl,
    "insert into __drizzle_migrations (hash, created_at) values ('later', 99999999999999)",
  );
  await expect(apply()).rejects.toMatchObject({
    kind: "newer",
    message: expect.stringMatching(/newer version/) as string,
  });
});

test("a migration edited after it was applied is refused", async () => {
  await apply();
  const edited = join(folder, "drizzle");
  cpSync(inRepository("drizzle"), edited, { recursive: true });
  const { entries } = JSON.parse(readFileSync(join(edited, "meta/_journal.json"), "utf8")) as {
    entries: { tag: string }[];
  };
  const file = join(edited, `${entries[0]?.tag}.sql`);
  writeFileSync(file, `${readFileSync(file, "utf8")}\n-- edited`);
  await expect(apply(edited)).rejects.toMatchObject({ kind: "changed" });
});

test("two processes migrate one after the other, and who waits too long is told so", async () => {
  expect((await Promise.all([apply(), apply()])).sort()).toEqual([0, expect.any(Number)]);
  const holder = await createConnection({ uri: ownerUrl });
  await holder.query("select get_lock(left(concat('migrate ', database()), 64), 0)");
  await expect(apply(undefined, 0)).rejects.toMatchObject({ kind: "locked" });
  await holder.end();
});

test("lines of the activity log from before it was a chain are chained once, in their order", async () => {
  const before = join(folder, "before-the-chain");
  cpSync(inRepository("drizzle"), before, { recursive: true });
  const journalFile = join(before, "meta/_journal.json");
  const journal = JSON.parse(readFileSync(journalFile, "utf8")) as { entries: { idx: number }[] };
  journal.entries = journal.entries.filter(({ idx }) => idx < 4);
  writeFileSync(journalFile, JSON.stringify(journal));
  await migrateOnly(before);
  const organisationId = crypto.randomUUID();
  const line = (at: string, event: string) =>
    `insert into activity_log values (uuid(), '${organisationId}', '${at}', null, '${event}', 'site', null, '{"name":"Ærø"}')`;
  await query(
    ownerUrl,
    `insert into organisations values ('${organisationId}', 'old', 'Old', '2026-01-01 00:00:00.000')`,
    line("2026-03-02 10:00:00.125", "site.changed"),
    line("2026-03-01 10:00:00.000", "site.created"),
  );
  await apply();
  const faultsNow = async () => {
    const check = new ChainCheck();
    const rows = await query(
      ownerUrl,
      `select id, organisation_id as organisationId, sequence, at, actor_id as actorId, event, subject_kind as subjectKind,
         subject_id as subjectId, detail, previous_hash as previousHash, hash from activity_log order by sequence`,
    );
    for (const row of rows) check.take(row as unknown as StoredLine);
    const [head] = await query(ownerUrl, "select sequence, hash from activity_heads");
    expect(check.finish(head as unknown as ChainHead)).toBe(2);
    expect(rows.map(({ event }) => event as string)).toEqual(["site.created", "site.changed"]);
    return check.faults;
  };
  expect(await faultsNow()).toEqual([]);
  await query(ownerUrl, "update activity_log set hash = '', event = 'site.lost' where sequence = 2");
  await apply();
  await query(ownerUrl, "update activity_log set event = 'site.changed' where sequence = 2");
  expect(await faultsNow()).not.toEqual([]);
});
