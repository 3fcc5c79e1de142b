import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createConnection, type RowDataPacket } from "mysql2/promise";
import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import { localPorts, portCount, type LocalSecrets } from "../../scripts/services/local-environment";
import { startMariaDb } from "../../scripts/services/mariadb";
import { freePortBlock, isPortFree } from "../../scripts/services/ports";
import { runs, startCommand, type StartCommand } from "../support/start-command";

/** One installation through all its mishaps: each test leaves it stopped, with its data. */
let folder: string;
let base: number;
let variables: Record<string, string>;
const ports = () => Object.values(localPorts(base));
const allPortsAreFree = async () => (await Promise.all(ports().map(isPortFree))).every(Boolean);

let running: StartCommand[] = [];
const start = (more: Record<string, string> = {}) => {
  const run = startCommand({ ...variables, ...more });
  running.push(run);
  return run;
};

interface ProcessFileContent {
  children: { pid: number; mark: string }[];
}

function childPid(mark: string): number {
  const content = readFileSync(join(folder, "run/processes.json"), "utf8");
  const child = (JSON.parse(content) as ProcessFileContent).children.find((one) => one.mark.includes(mark));
  if (!child) throw new Error(`No child with the mark ${mark}: ${content}`);
  return child.pid;
}

const isAlive = (pid: number): boolean => {
  try {
    return process.kill(pid, 0);
  } catch {
    return false;
  }
};

async function query(statement: string): Promise<RowDataPacket[]> {
  const { secrets } = JSON.parse(readFileSync(join(folder, "installation.json"), "utf8")) as {
    secrets: LocalSecrets;
  };
  const address = `127.0.0.1:${localPorts(base).mariaDb}/stillneedle`;
  const connection = await createConnection({
    uri: `mysql://stillneedle_owner:${secrets.ownerPassword}@${address}`,
  });
  try {
    return (await connection.query<RowDataPacket[]>(statement))[0];
  } finally {
    await connection.end();
  }
}

beforeAll(async () => {
  folder = join(mkdtempSync(join(tmpdir(), "start-")), "data");
  base = await freePortBlock(portCount);
  variables = { DATA_DIR: folder, PORT: String(base) };
});

/** A test that fails must not leave a run in the way of the next one. */
afterEach(async () => {
  for (const run of running) run.signal("SIGTERM");
  await Promise.all(running.map(({ ended }) => ended));
  running = [];
});

afterAll(() => rmSync(join(folder, ".."), { recursive: true, force: true }));

test("a first start that is killed half way does not spoil the next one", async () => {
  const first = start();
  await first.says(/Filling the empty database/);
  first.signal("SIGKILL");
  await first.ended;
  const second = start();
  await second.says(runs);
  expect(second.output()).toContain("taking over what it left");
  // Whole and once: both organisations of the demo, and the screened plan that comes last.
  expect(await query("select name from organisations")).toHaveLength(2);
  expect(await query("select id from screenings")).toHaveLength(1);
  second.signal("SIGTERM");
  expect(await second.ended).toBe(0);
});

/** The machine may have other things to do just then, so the fastest of all later starts counts. */
let fastestStartMs = Infinity;

async function startInTime(): Promise<StartCommand> {
  const startedAtMs = Date.now();
  const run = start();
  await run.says(runs);
  fastestStartMs = Math.min(fastestStartMs, Date.now() - startedAtMs);
  return run;
}

test("it prints the address and who can sign in, and Ctrl-C stops all of it", async () => {
  const run = await startInTime();
  expect(run.output()).toContain(`http://127.0.0.1:${base}\n`);
  expect(run.output()).toMatch(/Maren Oakshott +Planner/);
  expect((await fetch(`http://127.0.0.1:${base}/api/health`)).status).toBe(200);
  expect((await fetch(`http://127.0.0.1:${localPorts(base).mailbox}/`)).status).toBe(200);
  expect(run.output()).not.toContain("Filling the empty database");
  run.signal("SIGINT");
  expect(await run.ended).toBe(0);
  expect(await allPortsAreFree()).toBe(true);
});

test("a second start on the same data folder is refused, and the first goes on", async () => {
  const first = await startInTime();
  const second = start();
  expect(await second.ended).toBe(1);
  expect(second.output()).toMatch(/already runs on the data folder .*DATA_DIR and PORT/);
  expect((await fetch(`http://127.0.0.1:${base}/api/health`)).status).toBe(200);
  first.signal("SIGTERM");
  expect(await first.ended).toBe(0);
});

test("what a crash left running is taken over, and the data is kept", async () => {
  const crashed = await startInTime();
  const before = await query("select id from organisations");
  crashed.signal("SIGKILL");
  await crashed.ended;
  const mariaDbPid = childPid("--datadir");
  expect(isAlive(mariaDbPid)).toBe(true);
  const next = start();
  await next.says(runs);
  expect(next.output()).toContain("taking over what it left");
  expect(isAlive(mariaDbPid)).toBe(false);
  expect(await query("select id from organisations")).toEqual(before);
  next.signal("SIGTERM");
  expect(await next.ended).toBe(0);
});

test.each([
  ["delivery-worker", /The delivery worker ended \(by SIGKILL\)/],
  ["--datadir", /MariaDB ended \(by SIGKILL\)/],
])("when one process dies (%s) everything stops, and it says which", async (mark, message) => {
  const run = await startInTime();
  process.kill(childPid(mark), "SIGKILL");
  expect(await run.ended).toBe(1);
  expect(run.output()).toMatch(message);
  expect(run.output()).toContain('run "npm start" again');
  expect(await allPortsAreFree()).toBe(true);
});

test("a later start takes at most 10 s", () => {
  expect(fastestStartMs).toBeLessThan(10_000);
});

test("a busy port is named, with what to do", async () => {
  const { s3 } = localPorts(base);
  const holder = createServer();
  await new Promise<void>((resolve) => holder.listen(s3, "127.0.0.1", resolve));
  const run = start();
  expect(await run.ended).toBe(1);
  expect(run.output()).toMatch(new RegExp(`Port ${s3} .* the S3 fake .* busy.*PORT=`));
  holder.close();
});

test("a database of a newer version is refused and left alone", async () => {
  const { secrets } = JSON.parse(readFileSync(join(folder, "installation.json"), "utf8")) as {
    secrets: LocalSecrets;
  };
  const mariaDb = await startMariaDb({
    dataFolder: join(folder, "mariadb"),
    port: localPorts(base).mariaDb,
    passwords: { root: secrets.rootPassword, owner: secrets.ownerPassword, app: secrets.appPassword },
    databasePattern: "stillneedle",
  });
  await query("insert into __drizzle_migrations (hash, created_at) values ('later', 99999999999999)");
  await mariaDb.stop();
  const run = start();
  expect(await run.ended).toBe(1);
  expect(run.output()).toMatch(/database is of a newer version/);
  expect(run.output()).toContain("DATA_DIR");
  expect(await allPortsAreFree()).toBe(true);
});

test("a half-made data folder is named and left as it is", async () => {
  rmSync(join(folder, "mariadb"), { recursive: true });
  const run = start();
  expect(await run.ended).toBe(1);
  expect(run.output()).toMatch(/data folder .* is half made: its database .* is gone.*mv /s);
  expect(JSON.parse(readFileSync(join(folder, "installation.json"), "utf8"))).toMatchObject({ ready: true });
});

test("fakes refuse an address that others could reach, and do not mix with real services", async () => {
  const open = start({ APP_ORIGIN: "https://plans.example" });
  expect(await open.ended).toBe(1);
  expect(open.output()).toMatch(/loopback/);
  const mixed = start({ SMTP_URL: "smtp://mail.example" });
  expect(await mixed.ended).toBe(1);
  expect(mixed.output()).toMatch(/do not mix: SMTP_URL is set, but DATABASE_URL.* is not/);
});
