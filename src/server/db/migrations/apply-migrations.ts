import { drizzle } from "drizzle-orm/mysql2";
import { migrate } from "drizzle-orm/mysql2/migrator";
import { createConnection, type Connection, type RowDataPacket } from "mysql2/promise";
import { chainOldActivity } from "./chain-activity";
import { grantToApplication } from "./grants";
import { appliedMigrations, checkHistory, knownMigrations } from "./history";
import { MigrationFailure } from "./migration-failure";

export interface MigrationTask {
  /** A user that may create tables and grant. */
  ownerUrl: string;
  /** The application's user, which gets its rights. */
  appUrl: string;
  migrationsFolder: string;
  lockTimeoutS?: number;
}

/**
 * Brings a database to this version: one process at a time, under a named lock of the server.
 * @returns how many migrations were applied
 * @throws MigrationFailure
 */
export async function applyMigrations(task: MigrationTask): Promise<number> {
  const connection = await connect(task.ownerUrl, "MIGRATION_DATABASE_URL");
  try {
    await takeLock(connection, task.lockTimeoutS ?? 60);
    const known = knownMigrations(task.migrationsFolder);
    const applied = await appliedMigrations(connection);
    checkHistory(applied, known);
    await migrate(drizzle(connection), { migrationsFolder: task.migrationsFolder });
    await chainOldActivity(connection);
    await grantToApplication(connection, task.appUrl);
    return known.length - applied.length;
  } finally {
    // The lock ends with its connection.
    await connection.end();
  }
}

/**
 * Asks as the application's user whether the database is of this version, and changes nothing.
 * @throws MigrationFailure `newer`, `older` or `changed`
 */
export async function checkDatabase(appUrl: string, migrationsFolder: string): Promise<void> {
  const connection = await connect(appUrl, "DATABASE_URL");
  try {
    const known = knownMigrations(migrationsFolder);
    const applied = await appliedMigrations(connection);
    checkHistory(applied, known);
    if (applied.length === known.length) return;
    throw new MigrationFailure(
      "older",
      `The database lacks ${known.length - applied.length} migration(s) of this version. Run "npm run migrate" first.`,
    );
  } finally {
    await connection.end();
  }
}

async function connect(url: string, variable: string): Promise<Connection> {
  try {
    return await createConnection({ uri: url, timezone: "Z", supportBigNumbers: true });
  } catch (error) {
    throw new MigrationFailure(
      "unreachable",
      `The database of ${variable} does not answer: ${String(error)}. Check its address and its user.`,
    );
  }
}

async function takeLock(connection: Connection, timeoutS: number): Promise<void> {
  const [rows] = await connection.query<RowDataPacket[]>(
    "select get_lock(left(concat('migrate ', database()), 64), ?) as taken",
    [timeoutS],
  );
  if (rows[0]?.["taken"] === 1) return;
  throw new MigrationFailure(
    "locked",
    `Another process is migrating this database and did not finish within ${timeoutS} s. Try again when it has.`,
  );
}
