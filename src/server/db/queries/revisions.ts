import { and, asc, desc, eq, getTableColumns, inArray, isNull, lte, max, sql } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import type { RevisionState } from "~/domain/revision";
import type { Queryable } from "../client";
import { users } from "../schema/people";
import { planDocuments, plans, sites } from "../schema/plans";
import {
  planEditors,
  revisionComments,
  revisionContents,
  revisionEditors,
  revisionMails,
  revisionPositions,
  revisions,
} from "../schema/revisions";

export type RevisionRow = typeof revisions.$inferSelect;
export type RevisionContents = typeof revisionContents.$inferSelect;
export type RevisionPositionRow = typeof revisionPositions.$inferSelect;

const submitter = alias(users, "submitter");
const closer = alias(users, "closer");

const ofOrganisation = (organisationId: string, revisionId: string) =>
  and(eq(revisions.organisationId, organisationId), eq(revisions.id, revisionId));

/** A revision without what it froze, under its plan. */
export async function findRevision(
  db: Queryable,
  organisationId: string,
  planId: string,
  revisionId: string,
): Promise<RevisionRow | undefined> {
  const [row] = await db
    .select()
    .from(revisions)
    .where(and(ofOrganisation(organisationId, revisionId), eq(revisions.planId, planId)));
  return row;
}

/** The revision, held against other transactions until this one ends. */
export async function lockRevision(
  db: Queryable,
  organisationId: string,
  revisionId: string,
): Promise<RevisionRow | undefined> {
  const [row] = await db
    .select()
    .from(revisions)
    .where(ofOrganisation(organisationId, revisionId))
    .for("update");
  return row;
}

export async function findRevisionContents(
  db: Queryable,
  organisationId: string,
  revisionId: string,
): Promise<RevisionContents | undefined> {
  const [row] = await db
    .select(getTableColumns(revisionContents))
    .from(revisionContents)
    .innerJoin(revisions, eq(revisions.id, revisionContents.revisionId))
    .where(ofOrganisation(organisationId, revisionId));
  return row;
}

/** A plan's revisions, the newest first, with the people in them and what they found. */
export async function listRevisions(db: Queryable, organisationId: string, planId: string) {
  return db
    .select({
      ...getTableColumns(revisions),
      verdict: revisionContents.verdict,
      engineVersion: revisionContents.engineVersion,
      documentVersion: revisionContents.documentVersion,
      submittedByName: submitter.name,
      closedByName: closer.name,
    })
    .from(revisions)
    .innerJoin(revisionContents, eq(revisionContents.revisionId, revisions.id))
    .leftJoin(submitter, eq(submitter.id, revisions.submittedBy))
    .leftJoin(closer, eq(closer.id, revisions.closedBy))
    .where(and(eq(revisions.organisationId, organisationId), eq(revisions.planId, planId)))
    .orderBy(desc(revisions.ordinal));
}

/** The newest revision of each plan that is in one of the states, with its plan and site. */
export async function listLatestRevisions(
  db: Queryable,
  organisationId: string,
  states: readonly RevisionState[],
) {
  const latest = db
    .select({ planId: revisions.planId, ordinal: max(revisions.ordinal).as("latest_ordinal") })
    .from(revisions)
    .where(eq(revisions.organisationId, organisationId))
    .groupBy(revisions.planId)
    .as("latest");
  return db
    .select({
      id: revisions.id,
      planId: revisions.planId,
      planName: plans.name,
      siteName: sites.name,
      timeZone: sites.timeZone,
      ordinal: revisions.ordinal,
      state: revisions.state,
      note: revisions.note,
      returnReasons: revisions.returnReasons,
      verdict: revisionContents.verdict,
      documentVersion: revisionContents.documentVersion,
      workingVersion: planDocuments.version,
      submittedBy: revisions.submittedBy,
      submittedByName: submitter.name,
      submittedAt: revisions.submittedAt,
      closedAt: revisions.closedAt,
    })
    .from(revisions)
    .innerJoin(latest, and(eq(latest.planId, revisions.planId), eq(latest.ordinal, revisions.ordinal)))
    .innerJoin(revisionContents, eq(revisionContents.revisionId, revisions.id))
    .innerJoin(plans, eq(plans.id, revisions.planId))
    .innerJoin(sites, eq(sites.id, plans.siteId))
    .innerJoin(planDocuments, eq(planDocuments.planId, plans.id))
    .leftJoin(submitter, eq(submitter.id, revisions.submittedBy))
    .where(
      and(
        eq(revisions.organisationId, organisationId),
        inArray(revisions.state, [...states]),
        isNull(plans.archivedAt),
      ),
    )
    .orderBy(asc(revisions.submittedAt));
}

/** Call it with the plan's working copy locked, so that two revisions do not get the same letter. */
export async function nextRevisionOrdinal(db: Queryable, planId: string): Promise<number> {
  const [row] = await db
    .select({ ordinal: max(revisions.ordinal) })
    .from(revisions)
    .where(eq(revisions.planId, planId));
  return (row?.ordinal ?? 0) + 1;
}

const rowsPerInsert = 1000;

export async function insertRevision(
  db: Queryable,
  row: typeof revisions.$inferInsert,
  contents: RevisionContents,
  positions: readonly RevisionPositionRow[],
): Promise<void> {
  await db.insert(revisions).values(row);
  await db.insert(revisionContents).values(contents);
  for (let start = 0; start < positions.length; start += rowsPerInsert)
    await db.insert(revisionPositions).values(positions.slice(start, start + rowsPerInsert));
}

export async function updateRevision(
  db: Queryable,
  organisationId: string,
  revisionId: string,
  change: Partial<
    Pick<
      RevisionRow,
      | "state"
      | "underReviewOf"
      | "closedBy"
      | "closedAt"
      | "signedSentence"
      | "signedName"
      | "returnReasons"
      | "supersededAt"
    >
  >,
): Promise<void> {
  await db.update(revisions).set(change).where(ofOrganisation(organisationId, revisionId));
}

/** The released revisions of a plan: at most one but for the moment of a release. */
export async function listReleasedRevisions(db: Queryable, organisationId: string, planId: string) {
  return db
    .select()
    .from(revisions)
    .where(
      and(
        eq(revisions.organisationId, organisationId),
        eq(revisions.planId, planId),
        eq(revisions.state, "released"),
      ),
    )
    .for("update");
}

/** The positions of some revisions, by revision and sensor. */
export async function listRevisionPositions(db: Queryable, revisionIds: readonly string[]) {
  if (revisionIds.length === 0) return [];
  return db
    .select()
    .from(revisionPositions)
    .where(inArray(revisionPositions.revisionId, [...revisionIds]))
    .orderBy(asc(revisionPositions.revisionId), asc(revisionPositions.sensorId));
}

/** Notes that somebody has saved the working copy; call it in the transaction of the save. */
export async function recordPlanEditor(db: Queryable, row: typeof planEditors.$inferInsert): Promise<void> {
  const { lastVersion, lastEditedAt } = row;
  await db.insert(planEditors).values(row).onDuplicateKeyUpdate({ set: { lastVersion, lastEditedAt } });
}

export async function listPlanEditors(db: Queryable, organisationId: string, planId: string) {
  return db
    .select()
    .from(planEditors)
    .where(and(eq(planEditors.organisationId, organisationId), eq(planEditors.planId, planId)));
}

/** Forgets the edits that a release holds; later ones stay. */
export async function forgetPlanEditors(db: Queryable, planId: string, upToVersion: number): Promise<void> {
  await db
    .delete(planEditors)
    .where(and(eq(planEditors.planId, planId), lte(planEditors.lastVersion, upToVersion)));
}

export async function insertRevisionEditors(
  db: Queryable,
  rows: readonly (typeof revisionEditors.$inferInsert)[],
): Promise<void> {
  if (rows.length > 0) await db.insert(revisionEditors).values([...rows]);
}

export async function listRevisionEditors(db: Queryable, revisionIds: readonly string[]) {
  if (revisionIds.length === 0) return [];
  return db
    .select({ ...getTableColumns(revisionEditors), name: users.name })
    .from(revisionEditors)
    .innerJoin(users, eq(users.id, revisionEditors.userId))
    .where(inArray(revisionEditors.revisionId, [...revisionIds]))
    .orderBy(asc(users.name));
}

export async function insertRevisionComment(
  db: Queryable,
  row: typeof revisionComments.$inferInsert,
): Promise<void> {
  await db.insert(revisionComments).values(row);
}

/** What was said about a revision's positions, the oldest first. */
export async function listRevisionComments(db: Queryable, revisionId: string) {
  return db
    .select({ ...getTableColumns(revisionComments), authorName: users.name })
    .from(revisionComments)
    .leftJoin(users, eq(users.id, revisionComments.authorId))
    .where(eq(revisionComments.revisionId, revisionId))
    .orderBy(asc(revisionComments.writtenAt), asc(revisionComments.id));
}

export async function insertRevisionMails(
  db: Queryable,
  rows: readonly (typeof revisionMails.$inferInsert)[],
): Promise<void> {
  if (rows.length > 0) await db.insert(revisionMails).values([...rows]);
}

export async function findRevisionMail(db: Queryable, organisationId: string, mailId: string) {
  const [row] = await db
    .select(getTableColumns(revisionMails))
    .from(revisionMails)
    .innerJoin(revisions, eq(revisions.id, revisionMails.revisionId))
    .where(and(eq(revisions.organisationId, organisationId), eq(revisionMails.id, mailId)));
  return row;
}

/** The version of the working copy, held against saves until the transaction ends. */
export async function lockWorkingCopy(
  db: Queryable,
  organisationId: string,
  planId: string,
): Promise<number | undefined> {
  const ofTheirs = sql`exists (select 1 from ${plans} where ${plans.id} = ${planDocuments.planId} and ${plans.organisationId} = ${organisationId})`;
  const [row] = await db
    .select({ version: planDocuments.version })
    .from(planDocuments)
    .where(and(eq(planDocuments.planId, planId), ofTheirs))
    .for("update");
  return row?.version;
}
