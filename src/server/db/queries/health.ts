import { sql } from "drizzle-orm";
import type { Queryable } from "../client";

/** Comes back when the database answers. */
export async function ping(db: Queryable): Promise<void> {
  await db.execute(sql`select 1`);
}
