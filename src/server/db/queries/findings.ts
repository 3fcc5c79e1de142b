import { and, asc, eq, getTableColumns } from "drizzle-orm";
import type { Queryable } from "../client";
import { findings, screenings } from "../schema/plans";

export type FindingRow = typeof findings.$inferSelect;

const rowsPerInsert = 1000;

export async function insertFindings(db: Queryable, rows: readonly FindingRow[]): Promise<void> {
  for (let start = 0; start < rows.length; start += rowsPerInsert)
    await db.insert(findings).values(rows.slice(start, start + rowsPerInsert));
}

export async function listFindings(
  db: Queryable,
  organisationId: string,
  screeningId: string,
): Promise<FindingRow[]> {
  return db
    .select(getTableColumns(findings))
    .from(findings)
    .innerJoin(screenings, eq(screenings.id, findings.screeningId))
    .where(and(eq(screenings.organisationId, organisationId), eq(findings.screeningId, screeningId)))
    .orderBy(asc(findings.sensorId), asc(findings.limitId));
}
