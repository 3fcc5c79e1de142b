import { and, asc, desc, eq, getTableColumns, isNotNull, lt, lte, max } from "drizzle-orm";
import type { Queryable } from "../client";
import { users } from "../schema/people";
import { plans, sites } from "../schema/plans";
import { concessionReminders, decisions, revisionPositions, revisions } from "../schema/revisions";

export type DecisionRow = typeof decisions.$inferSelect;

/** Call it with the revision locked: the ordinal is the next one of the position. */
export async function insertDecision(
  db: Queryable,
  decision: Omit<typeof decisions.$inferInsert, "ordinal">,
): Promise<number> {
  const [last] = await db
    .select({ ordinal: max(decisions.ordinal) })
    .from(decisions)
    .where(and(eq(decisions.revisionId, decision.revisionId), eq(decisions.sensorId, decision.sensorId)));
  const ordinal = (last?.ordinal ?? 0) + 1;
  await db.insert(decisions).values({ ...decision, ordinal });
  return ordinal;
}

/** Every decision of a revision, each position's latest first. */
export async function listDecisions(db: Queryable, revisionId: string) {
  return db
    .select({ ...getTableColumns(decisions), decidedByName: users.name })
    .from(decisions)
    .leftJoin(users, eq(users.id, decisions.decidedBy))
    .where(eq(decisions.revisionId, revisionId))
    .orderBy(asc(decisions.sensorId), desc(decisions.ordinal));
}

/** What was decided on the positions of a plan's earlier revisions, the newest first. */
export async function listEarlierDecisions(
  db: Queryable,
  organisationId: string,
  planId: string,
  beforeOrdinal: number,
) {
  return db
    .select({
      ...getTableColumns(decisions),
      revisionOrdinal: revisions.ordinal,
      revisionState: revisions.state,
      decidedByName: users.name,
      verdict: revisionPositions.verdict,
    })
    .from(decisions)
    .innerJoin(revisions, eq(revisions.id, decisions.revisionId))
    .leftJoin(
      revisionPositions,
      and(
        eq(revisionPositions.revisionId, decisions.revisionId),
        eq(revisionPositions.sensorId, decisions.sensorId),
      ),
    )
    .leftJoin(users, eq(users.id, decisions.decidedBy))
    .where(
      and(
        eq(revisions.organisationId, organisationId),
        eq(revisions.planId, planId),
        lt(revisions.ordinal, beforeOrdinal),
      ),
    )
    .orderBy(desc(revisions.ordinal), desc(decisions.decidedAt), desc(decisions.ordinal));
}

/** The concessions of released revisions, of every organisation, that end on `day` or before; replaced ones among them. */
export async function listEndingConcessions(db: Queryable, day: string) {
  return db
    .select({
      ...getTableColumns(decisions),
      organisationId: revisions.organisationId,
      planId: revisions.planId,
      planName: plans.name,
      siteId: sites.id,
      siteName: sites.name,
      timeZone: sites.timeZone,
    })
    .from(decisions)
    .innerJoin(revisions, eq(revisions.id, decisions.revisionId))
    .innerJoin(plans, eq(plans.id, revisions.planId))
    .innerJoin(sites, eq(sites.id, plans.siteId))
    .where(
      and(
        eq(revisions.state, "released"),
        eq(decisions.kind, "concession"),
        isNotNull(decisions.expiresOn),
        lte(decisions.expiresOn, day),
      ),
    )
    .orderBy(asc(decisions.expiresOn), asc(decisions.revisionId), asc(decisions.sensorId));
}

/** The decision that stands for a position. */
export async function findLatestDecision(db: Queryable, revisionId: string, sensorId: string) {
  const [row] = await db
    .select()
    .from(decisions)
    .where(and(eq(decisions.revisionId, revisionId), eq(decisions.sensorId, sensorId)))
    .orderBy(desc(decisions.ordinal))
    .limit(1);
  return row;
}

/** Reminders already given for a concession, in days before its end. */
export async function listReminders(
  db: Queryable,
  { revisionId, sensorId, ordinal }: Pick<DecisionRow, "revisionId" | "sensorId" | "ordinal">,
): Promise<number[]> {
  const rows = await db
    .select({ daysBefore: concessionReminders.daysBefore })
    .from(concessionReminders)
    .where(
      and(
        eq(concessionReminders.revisionId, revisionId),
        eq(concessionReminders.sensorId, sensorId),
        eq(concessionReminders.decisionOrdinal, ordinal),
      ),
    );
  return rows.map(({ daysBefore }) => daysBefore);
}

export async function insertReminder(
  db: Queryable,
  row: typeof concessionReminders.$inferInsert,
): Promise<void> {
  await db.insert(concessionReminders).values(row);
}
