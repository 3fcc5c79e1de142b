import { createConnection } from "mysql2/promise";
import { inRepository } from "../../scripts/services/repository";
import { applyMigrations } from "../../src/server/db/migrations/apply-migrations";
import { databaseUrls, type TestServices } from "./test-services";

export interface TestDatabase {
  name: string;
  /** The application's user, with the rights that the migration grants. */
  appUrl: string;
  /** May do anything in this database. */
  ownerUrl: string;
}

/** An empty database out of the real migrations; one by that name before it is dropped. */
export async function createTestDatabase(services: TestServices, suffix: string): Promise<TestDatabase> {
  const name = `stillneedle_test_${suffix}`;
  const { owner, app } = databaseUrls(services, name);
  const withoutDatabase = new URL(owner);
  withoutDatabase.pathname = "/";
  const connection = await createConnection({ uri: withoutDatabase.href });
  try {
    await connection.query(`drop database if exists ${name}`);
    await connection.query(`create database ${name} character set utf8mb4`);
  } finally {
    await connection.end();
  }
  await applyMigrations({ ownerUrl: owner, appUrl: app, migrationsFolder: inRepository("drizzle") });
  return { name, appUrl: app, ownerUrl: owner };
}
