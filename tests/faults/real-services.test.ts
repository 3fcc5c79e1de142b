import { createConnection, type RowDataPacket } from "mysql2/promise";
import { afterAll, beforeAll, expect, test } from "vitest";
import { migrateDatabase } from "../../scripts/services/app";
import { localEnvironment } from "../../scripts/services/local-environment";
import { runs, startCommand } from "../support/start-command";
import { appOriginOf, databaseUrls, startTestServices, type RunningServices } from "../support/test-services";

/** Services that `npm start` did not start: to it they are real ones. */
let services: RunningServices;
let variables: Record<string, string>;
const urls = () => databaseUrls(services, "stillneedle_test_real");

async function query(statement: string, database = true): Promise<RowDataPacket[]> {
  const url = new URL(urls().owner);
  if (!database) url.pathname = "/";
  const connection = await createConnection({ uri: url.href });
  try {
    return (await connection.query<RowDataPacket[]>(statement))[0];
  } finally {
    await connection.end();
  }
}

beforeAll(async () => {
  services = await startTestServices();
  await query("create database stillneedle_test_real", false);
  const { LOCAL_FAKES: _fakes, ...real } = localEnvironment(services.ports, services.secrets, {
    appOrigin: appOriginOf(services),
    databaseUrl: urls().app,
  });
  variables = real;
});

afterAll(() => services.stop());

test("a database that was not migrated is refused with the command to run, and nothing is migrated", async () => {
  await query("create table first (id int)");
  await query("grant select on first to 'stillneedle_app'@'127.0.0.1'");
  const run = startCommand(variables);
  expect(await run.ended).toBe(1);
  expect(run.output()).toContain('Run "npm run migrate" first');
  expect(await query("show tables")).toHaveLength(1);
  await query("drop table first");
});

test("after the migrate command it runs on them, and seeds nothing", async () => {
  const migrated = await migrateDatabase(variables, urls().owner);
  expect(migrated).toMatchObject({
    status: 0,
    stdout: expect.stringMatching(/migration\(s\) applied/) as string,
  });
  const run = startCommand(variables);
  await run.says(runs);
  expect(run.output()).not.toContain("Who can sign in");
  expect((await fetch(`${appOriginOf(services)}/api/health`)).status).toBe(200);
  expect(await query("select id from organisations")).toEqual([]);
  run.signal("SIGTERM");
  expect(await run.ended).toBe(0);
});

test("a database of a newer version is refused", async () => {
  await query("insert into __drizzle_migrations (hash, created_at) values ('later', 99999999999999)");
  const run = startCommand(variables);
  expect(await run.ended).toBe(1);
  expect(run.output()).toMatch(/newer version/);
  expect((await migrateDatabase(variables, urls().owner)).status).toBe(4);
});
