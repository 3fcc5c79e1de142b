import { join } from "node:path";
import { createConnection, type Connection, type RowDataPacket } from "mysql2/promise";
import { demoPeople } from "../seed/demo-people";
import { migrateDatabase, nodeEntry, seedDemo, startDeliveryWorker, startServer } from "../services/app";
import { InstallFailure, ensureInstalled, mariaDbServer } from "../services/debian-packages";
import { startFakes } from "../services/fakes";
import { localEnvironment, localPorts, type LocalPorts } from "../services/local-environment";
import { startMariaDb } from "../services/mariadb";
import { isPortFree } from "../services/ports";
import { ensureBuild } from "./ensure-build";
import { mariaDbFolderIn, openInstallation, saveInstallation, type Installation } from "./installation";
import { ProcessFile } from "./process-file";
import type { Settings } from "./settings";
import { StartFailure } from "./start-failure";
import { Supervisor } from "./supervisor";

const database = "stillneedle";
/** In the command line of every start, by which a running one is known. */
const startMark = "scripts/start.mjs";

export interface LocalRun {
  supervisor: Supervisor;
  ports: LocalPorts;
}

type LocalSettings = Extract<Settings, { services: "fakes" }>;

/** MariaDB, the fakes and the app on this machine. Whatever was started is stopped again when it fails. */
export async function startOnFakes(
  settings: LocalSettings,
  report: (line: string) => void,
): Promise<LocalRun> {
  const { dataFolder, basePort } = settings;
  const installation = openInstallation(dataFolder, basePort + 1);
  const processFile = await ProcessFile.claim(dataFolder, startMark, report);
  const supervisor = new Supervisor(processFile);
  try {
    const ports = { ...localPorts(basePort), signIn: installation.signInPort };
    await checkPorts(ports);
    await installMariaDb(report);
    await ensureBuild(report);
    await startAll(settings, installation, ports, supervisor, report);
    return { supervisor, ports };
  } catch (error) {
    await supervisor.stop();
    throw error;
  }
}

const portNames: Record<keyof LocalPorts, string> = {
  app: "the app",
  signIn: "the sign-in fake",
  mailbox: "the mailbox's page",
  s3: "the S3 fake",
  smtp: "the mail fake",
  mariaDb: "MariaDB",
};

async function checkPorts(ports: LocalPorts): Promise<void> {
  const numbers = Object.values(ports);
  for (const [name, port] of Object.entries(ports) as [keyof LocalPorts, number][]) {
    const taken = numbers.filter((other) => other === port).length > 1;
    if (!taken && (await isPortFree(port))) continue;
    throw new StartFailure(
      "busy-port",
      `Port ${port} on 127.0.0.1, which ${portNames[name]} needs, is busy. Stop what uses it, or choose other ` +
        `ports with PORT (the app's; the five after it are used too), such as "PORT=${ports.app + 100} npm start"` +
        `${name === "signIn" ? "; sign-in keeps its port as long as the data folder, which DATA_DIR sets" : ""}.`,
    );
  }
}

async function installMariaDb(report: (line: string) => void): Promise<void> {
  try {
    await ensureInstalled(mariaDbServer, { report });
  } catch (error) {
    if (error instanceof InstallFailure) throw new StartFailure("no-right-to-install", error.message);
    throw error;
  }
}

async function startAll(
  { appOrigin, dataFolder }: LocalSettings,
  installation: Installation,
  ports: LocalPorts,
  supervisor: Supervisor,
  report: (line: string) => void,
): Promise<void> {
  const { secrets } = installation;
  const logFolder = join(dataFolder, "logs");
  const mariaDbFolder = mariaDbFolderIn(dataFolder);
  const mariaDb = startMariaDb({
    dataFolder: mariaDbFolder,
    port: ports.mariaDb,
    passwords: { root: secrets.rootPassword, owner: secrets.ownerPassword, app: secrets.appPassword },
    databasePattern: database,
    database,
    logFile: join(logFolder, "mariadb.log"),
  }).then((started) => {
    supervisor.watch(started.process, `--datadir=${mariaDbFolder}`, started.stop);
    return started;
  });
  const fakes = startFakes({
    ports,
    secrets,
    dataFolder,
    logFolder,
    people: demoPeople,
    appOrigins: [appOrigin],
  }).then((started) => {
    for (const fake of started) supervisor.watch(fake, "fakes/");
  });
  await allOrFirstFailure([mariaDb, fakes]);

  const ownerUrl = (await mariaDb).ownerUrl(database);
  const environment = localEnvironment(ports, secrets, {
    appOrigin,
    databaseUrl: (await mariaDb).appUrl(database),
  });
  if (!installation.ready) await emptyDatabase(ownerUrl);
  await migrate(environment, ownerUrl);
  await seedWhenEmpty(environment, ownerUrl, report);
  if (!installation.ready) saveInstallation(dataFolder, { ...installation, ready: true });

  await allOrFirstFailure([
    startServer(environment, logFolder).then((server) => supervisor.watch(server, nodeEntry("server"))),
    startDeliveryWorker(environment, logFolder).then((worker) =>
      supervisor.watch(worker, nodeEntry("delivery-worker")),
    ),
  ]);
}

/** Waits for all, also when one fails: what still starts has to be known before everything is stopped. */
async function allOrFirstFailure(starting: readonly Promise<unknown>[]): Promise<void> {
  const failed = (await Promise.allSettled(starting)).find(({ status }) => status === "rejected");
  if (failed?.status === "rejected") throw failed.reason;
}

async function withConnection<Result>(
  ownerUrl: string,
  work: (connection: Connection) => Promise<Result>,
): Promise<Result> {
  const connection = await createConnection({ uri: ownerUrl });
  try {
    return await work(connection);
  } finally {
    await connection.end();
  }
}

/** A first start that broke off may have left half a migration or half a demo, which nobody has used. */
const emptyDatabase = (ownerUrl: string): Promise<void> =>
  withConnection(ownerUrl, async (connection) => {
    await connection.query(`drop database ${database}`);
    await connection.query(`create database ${database} character set utf8mb4`);
  });

/** The migrate command's exit status for a database of a newer version. */
const newerStatus = 4;

async function migrate(environment: Record<string, string>, ownerUrl: string): Promise<void> {
  const { status, stderr } = await migrateDatabase(environment, ownerUrl);
  if (status === newerStatus) {
    throw new StartFailure(
      "newer-database",
      `${stderr.trim()}\nFor another database here, set DATA_DIR to a new folder.`,
    );
  }
  if (status !== 0)
    throw new StartFailure("migration", `The database could not be migrated. ${stderr.trim()}`);
}

async function seedWhenEmpty(
  environment: Record<string, string>,
  ownerUrl: string,
  report: (line: string) => void,
): Promise<void> {
  const isEmpty = await withConnection(ownerUrl, async (connection) => {
    const [rows] = await connection.query<RowDataPacket[]>("select 1 from organisations limit 1");
    return rows.length === 0;
  });
  if (!isEmpty) return;
  report("Filling the empty database with the demo …");
  const { status, stdout, stderr } = await seedDemo(environment);
  if (status !== 0) throw new StartFailure("seed", `The demo could not be made:\n${stdout}${stderr}`);
}
