import { and, eq } from "drizzle-orm";
import type { Queryable } from "../client";
import { drawings } from "../schema/plans";

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
