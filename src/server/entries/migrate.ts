import { fileURLToPath } from "node:url";
import { env } from "../env";
import { applyMigrations, checkDatabase } from "../db/migrations/apply-migrations";
import { MigrationFailure, exitStatusOf } from "../db/migrations/migration-failure";

// As built this file is dist/node/migrate.mjs.
const migrationsFolder = fileURLToPath(new URL("../../drizzle", import.meta.url));

async function run(): Promise<string> {
  const { databaseUrl, migrationDatabaseUrl } = env();
  if (process.argv.includes("--check")) {
    await checkDatabase(databaseUrl, migrationsFolder);
    return "The database is of this version.";
  }
  if (migrationDatabaseUrl === undefined) {
    throw new Error("MIGRATION_DATABASE_URL is not set: name a user that may create tables and grant.");
  }
  const count = await applyMigrations({
    ownerUrl: migrationDatabaseUrl,
    appUrl: databaseUrl,
    migrationsFolder,
  });
  return count === 0 ? "The database is up to date." : `${count} migration(s) applied.`;
}

try {
  console.log(await run());
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  process.exitCode = error instanceof MigrationFailure ? exitStatusOf[error.kind] : 1;
}
