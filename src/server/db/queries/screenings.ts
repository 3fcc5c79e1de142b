import { and, eq } from "drizzle-orm";
import type { Queryable } from "../client";
import { screenings } from "../schema/plans";

/** A screening without its document and result, which are large. */
const heading = {
  id: screenings.id,
  organisationId: screenings.organisationId,
  planId: screenings.planId,
  documentVersion: screenings.documentVersion,
  inputHash: screenings.inputHash,
  engineVersion: screenings.engineVersion,
  verdict: screenings.verdict,
  screenedBy: screenings.screenedBy,
  screenedAt: screenings.screenedAt,
};

export async function findScreening(
  db: Queryable,
  organisationId: string,
  planId: string,
  screeningId: string,
) {
  const [row] = await db
    .select(heading)
    .from(screenings)
    .where(
      and(
        eq(screenings.organisationId, organisationId),
        eq(screenings.planId, planId),
        eq(screenings.id, screeningId),
      ),
    );
  return row;
}
