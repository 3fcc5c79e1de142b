import { type ActivityEvent, activityEvents } from "~/domain/activity";
import { byteOrderMark, type CsvCell, csvText } from "~/domain/csv";
import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { activityAfter, type ActivityFilter } from "../db/queries/activity";
import { findOrganisation } from "../db/queries/organisations";
import { type ActivityFilterInput, filterOf } from "./view";

const linesPerRead = 1000;

const header = [
  "line",
  "time (UTC)",
  "actor",
  "actor id",
  "event",
  "in words",
  "subject",
  "subject id",
  "detail",
  "hash of the line before",
  "hash",
];

type Line = Awaited<ReturnType<typeof activityAfter>>[number];

const cellsOf = (line: Line): CsvCell[] => [
  line.sequence,
  line.at.toISOString(),
  line.actorId === null ? "the service" : (line.actorName ?? ""),
  line.actorId,
  line.event,
  Object.hasOwn(activityEvents, line.event) ? activityEvents[line.event as ActivityEvent] : "",
  line.subjectKind,
  line.subjectId,
  line.detail,
  line.previousHash,
  line.hash,
];

/** The lines that match, the oldest first, read piece by piece as they are sent. */
export async function activityCsv({ organisationId }: Member, input: ActivityFilterInput) {
  const organisation = await findOrganisation(db(), organisationId);
  return {
    fileName: `${organisation?.slug ?? "organisation"}-activity.csv`,
    body: streamOf(csvPieces(organisationId, filterOf(input))),
  };
}

async function* csvPieces(organisationId: string, filter: ActivityFilter): AsyncGenerator<string> {
  yield byteOrderMark + csvText([header]);
  let sequence = 0;
  for (;;) {
    const lines = await activityAfter(db(), organisationId, filter, sequence, linesPerRead);
    if (lines.length > 0) yield csvText(lines.map(cellsOf));
    if (lines.length < linesPerRead) return;
    sequence = lines.at(-1)?.sequence ?? sequence;
  }
}

/** Reads the next piece when whoever receives has taken the one before. */
function streamOf(pieces: AsyncGenerator<string>): ReadableStream<Uint8Array<ArrayBuffer>> {
  const encoder = new TextEncoder();
  return new ReadableStream({
    async pull(controller) {
      const { value, done } = await pieces.next();
      if (done === true) controller.close();
      else controller.enqueue(encoder.encode(value));
    },
    async cancel() {
      await pieces.return(undefined);
    },
  });
}
