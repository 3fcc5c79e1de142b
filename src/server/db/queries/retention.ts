import { and, inArray, lt, or, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { notices } from "../schema/notices";
import { drawings, planDocuments, screenings } from "../schema/plans";
import { revisionContents } from "../schema/revisions";

/** Screenings from before `screenedBefore` that no notice and no revision was made from and that a later one of their plan has replaced. */
export async function deleteUnreferencedScreenings(db: Queryable, screenedBefore: Date): Promise<void> {
  const later = sql`select 1 from (select plan_id, max(screened_at) as newest from screenings group by plan_id) as latest where latest.plan_id = ${screenings.planId} and latest.newest > ${screenings.screenedAt}`;
  await db
    .delete(screenings)
    .where(
      and(
        lt(screenings.screenedAt, screenedBefore),
        sql`exists (${later})`,
        sql`not exists (select 1 from ${notices} where ${notices.screeningId} = ${screenings.id})`,
        sql`not exists (select 1 from ${revisionContents} where ${revisionContents.screeningId} = ${screenings.id})`,
      ),
    );
}

/** Drawings from before `uploadedBefore` that neither the plan's working copy nor any of its screenings or revisions shows. */
export async function deleteUnreferencedDrawings(db: Queryable, uploadedBefore: Date): Promise<void> {
  await db
    .delete(drawings)
    .where(
      and(
        lt(drawings.uploadedAt, uploadedBefore),
        sql`not exists (select 1 from ${planDocuments} where ${planDocuments.planId} = ${drawings.planId} and instr(${planDocuments.document}, ${drawings.id}) > 0)`,
        sql`not exists (select 1 from ${screenings} where ${screenings.planId} = ${drawings.planId} and instr(${screenings.document}, ${drawings.id}) > 0)`,
        sql`not exists (select 1 from ${revisionContents} where ${revisionContents.drawingId} = ${drawings.id} or instr(${revisionContents.document}, ${drawings.id}) > 0)`,
      ),
    );
}

/** Those of `keys` that a drawing's row names. */
export async function storedKeysAmong(db: Queryable, keys: readonly string[]): Promise<Set<string>> {
  if (keys.length === 0) return new Set();
  const rows = await db
    .select({ storageKey: drawings.storageKey, thumbnailKey: drawings.thumbnailKey })
    .from(drawings)
    .where(or(inArray(drawings.storageKey, [...keys]), inArray(drawings.thumbnailKey, [...keys])));
  return new Set(rows.flatMap(({ storageKey, thumbnailKey }) => [storageKey, thumbnailKey]));
}
