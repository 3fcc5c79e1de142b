import { createConnection, type Connection, type RowDataPacket } from "mysql2/promise";
import { MigrationFailure } from "./migration-failure";

/** What is written once and never changed: the application's user may only add to it and read it. */
const appendOnlyTables = new Set(["activity_log", "revision_contents", "decisions", "revision_comments"]);
/** Its rows move on and never go. */
const headsTable = "activity_heads";
const migrationsTable = "__drizzle_migrations";

interface Account {
  user: string;
  host: string;
}

/** Gives the application's user what it needs on each table, and makes sure that it has no more. */
export async function grantToApplication(owner: Connection, appUrl: string): Promise<void> {
  const app = await connectAs(appUrl);
  try {
    const account = await accountOf(app);
    const [tables] = await owner.query<RowDataPacket[]>("show full tables where table_type = 'BASE TABLE'");
    for (const row of tables) {
      const table = String(Object.values(row)[0]);
      await owner.query(`grant ${rightsOn(table)} on ?? to ?@?`, [table, account.user, account.host]);
    }
    await checkRights(app);
  } finally {
    await app.end();
  }
}

function rightsOn(table: string): string {
  if (table === migrationsTable) return "select";
  if (table === headsTable) return "select, insert, update";
  return appendOnlyTables.has(table) ? "select, insert" : "select, insert, update, delete";
}

/** Without a database in the address: before the first grant the user may not enter it. */
async function connectAs(appUrl: string): Promise<Connection> {
  const url = new URL(appUrl);
  url.pathname = "/";
  try {
    return await createConnection({ uri: url.href });
  } catch (error) {
    throw new MigrationFailure(
      "rights",
      `The application's user of DATABASE_URL can't connect: ${String(error)}. Create it, then migrate again.`,
    );
  }
}

async function accountOf(app: Connection): Promise<Account> {
  const [rows] = await app.query<RowDataPacket[]>("select current_user() as account");
  const account = String(rows[0]?.["account"]);
  const at = account.lastIndexOf("@");
  return { user: account.slice(0, at), host: account.slice(at + 1) };
}

/** A right on the whole database or server would undo what the tables' grants leave out. */
async function checkRights(app: Connection): Promise<void> {
  const [rows] = await app.query<RowDataPacket[]>("show grants");
  const grants = rows.map((row) => String(Object.values(row)[0]));
  const tooWide = grants.find(
    (grant) => / ON \S+\.\* TO /.test(grant) && !grant.startsWith("GRANT USAGE ON"),
  );
  const onLog = grants.find((grant) => /(UPDATE|DELETE|ALL).* ON \S+\.`activity_log` /.test(grant));
  if (!tooWide && !onLog) return;
  const found = (tooWide ?? onLog ?? "").replace(/ IDENTIFIED .*$/, "");
  throw new MigrationFailure(
    "rights",
    `The application's user could change the activity log ("${found}"). Revoke that, then migrate again.`,
  );
}
