import { readMigrationFiles, type MigrationMeta } from "drizzle-orm/migrator";
import type { Connection, RowDataPacket } from "mysql2/promise";
import { MigrationFailure } from "./migration-failure";

interface AppliedMigration {
  hash: string;
  createdAtMs: number;
}

export const knownMigrations = (folder: string): MigrationMeta[] =>
  readMigrationFiles({ migrationsFolder: folder });

export async function appliedMigrations(connection: Connection): Promise<AppliedMigration[]> {
  const [tables] = await connection.query<RowDataPacket[]>("show tables like '\\_\\_drizzle\\_migrations'");
  if (tables.length === 0) return [];
  const [rows] = await connection.query<RowDataPacket[]>(
    "select hash, created_at from __drizzle_migrations order by created_at",
  );
  return rows.map((row) => ({ hash: String(row["hash"]), createdAtMs: Number(row["created_at"]) }));
}

/**
 * Refuses a history that this version can't go on from.
 * @throws MigrationFailure `newer` when the database has a migration that this version doesn't know, `changed`
 *   when one was edited after it was applied or would be passed over
 */
export function checkHistory(applied: readonly AppliedMigration[], known: readonly MigrationMeta[]): void {
  const knownByTime = new Map(known.map((migration) => [migration.folderMillis, migration]));
  const strange = applied.filter(({ createdAtMs }) => !knownByTime.has(createdAtMs));
  if (strange.length > 0) {
    throw new MigrationFailure(
      "newer",
      `The database is of a newer version: it has ${strange.length} migration(s) that this version does not know. ` +
        "Run the version that made them or a later one, or use another database.",
    );
  }
  if (applied.some(({ hash, createdAtMs }) => knownByTime.get(createdAtMs)?.hash !== hash)) {
    throw new MigrationFailure(
      "changed",
      "A migration was changed after this database got it. Restore the file in drizzle/ and put the change into a new migration.",
    );
  }
  const last = applied.at(-1)?.createdAtMs ?? 0;
  const times = new Set(applied.map(({ createdAtMs }) => createdAtMs));
  if (known.some(({ folderMillis }) => folderMillis < last && !times.has(folderMillis))) {
    throw new MigrationFailure(
      "changed",
      "A migration in drizzle/ is older than the last one applied and would be passed over. Generate it again.",
    );
  }
}
