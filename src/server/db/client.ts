import { drizzle, type MySql2Database } from "drizzle-orm/mysql2";
import { createPool, type Pool, type PoolOptions } from "mysql2/promise";
import { env } from "../env";
import { log } from "../log";

export type Database = MySql2Database;

/** A database or a transaction on one; queries take either. */
export type Queryable = Pick<Database, "select" | "insert" | "update" | "delete" | "execute">;

/** The connection settings that every pool of this product needs (UTC, exact big integers, one statement a call). */
export function poolOptions(databaseUrl: string): PoolOptions {
  return {
    uri: databaseUrl,
    timezone: "Z",
    supportBigNumbers: true,
    charset: "utf8mb4_unicode_ci",
    connectionLimit: 10,
    maxIdle: 10,
    enableKeepAlive: true,
  };
}

let pool: Pool | undefined;
let database: Database | undefined;

/** The process's database, opened on first use. */
export function db(): Database {
  if (database === undefined) {
    pool = createPool(poolOptions(env().databaseUrl));
    // An error event without a listener would end the process; the query that meets it fails by itself.
    pool.pool.on("connection", (connection) => {
      connection.on("error", (error: Error) =>
        log().warn({ error: error.message }, "database connection lost"),
      );
    });
    database = drizzle(pool);
  }
  return database;
}

export async function closeDatabase(): Promise<void> {
  await pool?.end();
  pool = undefined;
  database = undefined;
}
