import { and, desc, eq, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { users } from "../schema/people";
import { planDocuments, screenings, statelessScreenings } from "../schema/plans";

export type ScreeningRow = typeof screenings.$inferInsert;

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

export async function insertScreening(db: Queryable, row: ScreeningRow): Promise<void> {
  await db.insert(screenings).values(row);
}

/** The screening's row, held against other transactions until this one ends. */
export async function lockScreening(
  db: Queryable,
  organisationId: string,
  planId: string,
  screeningId: string,
) {
  const [row] = await db
    .select({ id: screenings.id })
    .from(screenings)
    .where(
      and(
        eq(screenings.organisationId, organisationId),
        eq(screenings.planId, planId),
        eq(screenings.id, screeningId),
      ),
    )
    .for("update");
  return row;
}

/** The result to the byte, without the document. */
export async function findScreeningResult(db: Queryable, organisationId: string, screeningId: string) {
  const [row] = await db
    .select({ result: screenings.result })
    .from(screenings)
    .where(and(eq(screenings.organisationId, organisationId), eq(screenings.id, screeningId)));
  return row?.result;
}

/** A screening without its document and result, who ran it, and the version at which the plan's working copy now is. */
export async function findScreeningHeading(db: Queryable, organisationId: string, screeningId: string) {
  const [row] = await db
    .select({ ...heading, screenedByName: users.name, currentVersion: planDocuments.version })
    .from(screenings)
    .leftJoin(users, eq(users.id, screenings.screenedBy))
    .leftJoin(planDocuments, eq(planDocuments.planId, screenings.planId))
    .where(and(eq(screenings.organisationId, organisationId), eq(screenings.id, screeningId)));
  return row;
}

/** The same with its document and result, to the byte. */
export async function findWholeScreening(db: Queryable, organisationId: string, screeningId: string) {
  const [row] = await db
    .select({
      ...heading,
      document: screenings.document,
      result: screenings.result,
      screenedByName: users.name,
      currentVersion: planDocuments.version,
    })
    .from(screenings)
    .leftJoin(users, eq(users.id, screenings.screenedBy))
    .leftJoin(planDocuments, eq(planDocuments.planId, screenings.planId))
    .where(and(eq(screenings.organisationId, organisationId), eq(screenings.id, screeningId)));
  return row;
}

/** A plan's screenings, the newest first. */
export async function listScreenings(db: Queryable, organisationId: string, planId: string, limit: number) {
  return db
    .select(heading)
    .from(screenings)
    .where(and(eq(screenings.organisationId, organisationId), eq(screenings.planId, planId)))
    .orderBy(desc(screenings.screenedAt), desc(screenings.id))
    .limit(limit);
}

/**
 * Takes the person's one place for a stateless screening.
 * @returns false when another run of theirs holds it, in whatever process.
 */
export async function takeStatelessPlace(
  db: Queryable,
  place: { userId: string; runId: string; now: Date; expiresAt: Date },
): Promise<boolean> {
  const { userId, runId, now, expiresAt } = place;
  const hasRunOut = sql`${statelessScreenings.expiresAt} <= ${now}`;
  // MariaDB assigns from left to right: the second line sees the run of the first.
  await db
    .insert(statelessScreenings)
    .values({ userId, runId, expiresAt })
    .onDuplicateKeyUpdate({
      set: {
        runId: sql`if(${hasRunOut}, ${runId}, ${statelessScreenings.runId})`,
        expiresAt: sql`if(${statelessScreenings.runId} = ${runId}, ${expiresAt}, ${statelessScreenings.expiresAt})`,
      },
    });
  const [held] = await db
    .select({ runId: statelessScreenings.runId })
    .from(statelessScreenings)
    .where(eq(statelessScreenings.userId, userId));
  return held?.runId === runId;
}

export async function leaveStatelessPlace(db: Queryable, userId: string, runId: string): Promise<void> {
  await db
    .delete(statelessScreenings)
    .where(and(eq(statelessScreenings.userId, userId), eq(statelessScreenings.runId, runId)));
}
