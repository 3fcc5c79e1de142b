import { and, desc, eq } from "drizzle-orm";
import type { Queryable } from "../client";
import { drawings } from "../schema/plans";

export type DrawingRow = typeof drawings.$inferSelect;

export async function findDrawing(db: Queryable, organisationId: string, planId: string, drawingId: string) {
  const [row] = await db
    .select()
    .from(drawings)
    .where(
      and(
        eq(drawings.organisationId, organisationId),
        eq(drawings.planId, planId),
        eq(drawings.id, drawingId),
      ),
    );
  return row;
}

/** A plan's drawings, the newest first. */
export async function listDrawings(db: Queryable, organisationId: string, planId: string) {
  return db
    .select()
    .from(drawings)
    .where(and(eq(drawings.organisationId, organisationId), eq(drawings.planId, planId)))
    .orderBy(desc(drawings.uploadedAt), desc(drawings.id));
}

export async function insertDrawing(db: Queryable, row: typeof drawings.$inferInsert): Promise<void> {
  await db.insert(drawings).values(row);
}
