import { calendarDay, concessionHasEnded, reminderDays, reminderDue } from "~/domain/decision";
import { revisionLetters } from "~/domain/revision";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import {
  findLatestDecision,
  insertDecision,
  insertReminder,
  listEndingConcessions,
  listReminders,
} from "../db/queries/decisions";
import { listRevisionPositions, lockRevision, type RevisionRow } from "../db/queries/revisions";
import { listContacts } from "../db/queries/sites";
import { called, peopleBy, tell } from "./tell";

type Concession = Awaited<ReturnType<typeof listEndingConcessions>>[number];

const dayMs = 24 * 60 * 60_000;

/**
 * Turns concessions whose last day is past on their site's calendar into held, and tells planner and auditor 30 and 7
 * days before. Any number of processes may do it at once: each concession is looked at again with its revision locked.
 */
export async function keepConcessions(now = new Date()): Promise<void> {
  const furthest = calendarDay(new Date(now.getTime() + (Math.max(...reminderDays) + 1) * dayMs), "UTC");
  for (const concession of await listEndingConcessions(db(), furthest))
    await db().transaction((tx) => keepConcession(tx, concession, now));
}

async function keepConcession(tx: Queryable, concession: Concession, now: Date): Promise<void> {
  const { organisationId, revisionId, sensorId, ordinal, expiresOn, timeZone } = concession;
  const revision = await lockRevision(tx, organisationId, revisionId);
  const latest = await findLatestDecision(tx, revisionId, sensorId);
  if (revision?.state !== "released" || latest?.ordinal !== ordinal || expiresOn === null) return;
  const today = calendarDay(now, timeZone);
  if (concessionHasEnded(expiresOn, today)) {
    await endConcession(tx, concession, revision, now);
    return;
  }
  const due = reminderDue(expiresOn, calendarDay(concession.decidedAt, timeZone), today);
  if (due === null || (await listReminders(tx, concession)).some((daysBefore) => daysBefore <= due)) return;
  await insertReminder(tx, { revisionId, sensorId, decisionOrdinal: ordinal, daysBefore: due, toldAt: now });
  const name = await positionName(tx, revisionId, sensorId);
  await tell(tx, revision, "concession-ending", await plannerAndAuditor(tx, concession, revision), {
    subject: `Concession ends on ${expiresOn}: ${name}`,
    sentences: [
      `The concession for ${name} in ${called({ name: concession.planName }, revision)}, ${concession.siteName}, holds through ${expiresOn}. After that day the position is held.`,
    ],
    quoted: { heading: "Reason of the concession", text: concession.reason },
  });
}

async function endConcession(
  tx: Queryable,
  concession: Concession,
  revision: RevisionRow,
  now: Date,
): Promise<void> {
  const { organisationId, revisionId, sensorId, expiresOn } = concession;
  const name = await positionName(tx, revisionId, sensorId);
  await insertDecision(tx, {
    revisionId,
    sensorId,
    kind: "held",
    reason: `The concession held through ${String(expiresOn)} and has ended. Verify on site before the position is used.`,
    expiresOn: null,
    moveTo: null,
    decidedBy: null,
    decidedAt: now,
  });
  const contacts = await listContacts(tx, organisationId, concession.siteId);
  const told = [...(await plannerAndAuditor(tx, concession, revision)), ...contacts];
  await tell(
    tx,
    revision,
    "concession-ended",
    told.filter(({ email }, index) => told.findIndex((other) => other.email === email) === index),
    {
      subject: `Held: ${name}, its concession has ended`,
      sentences: [
        `The concession for ${name} in ${called({ name: concession.planName }, revision)}, ${concession.siteName}, held through ${String(expiresOn)} and has ended. The position is held: do not use it until a reading on site is accepted.`,
      ],
    },
  );
  await recordActivity(tx, {
    organisationId,
    actorId: null,
    event: "concession.ended",
    subjectKind: "revision",
    subjectId: revisionId,
    detail: {
      planId: concession.planId,
      revision: revisionLetters(revision.ordinal),
      sensorId,
      from: "concession",
      to: "held",
    },
  });
}

const plannerAndAuditor = (tx: Queryable, concession: Concession, revision: RevisionRow) =>
  peopleBy(tx, concession.organisationId, [revision.submittedBy, concession.decidedBy]);

async function positionName(tx: Queryable, revisionId: string, sensorId: string): Promise<string> {
  const positions = await listRevisionPositions(tx, [revisionId]);
  return positions.find((one) => one.sensorId === sensorId)?.sensorName ?? sensorId;
}
