import { z } from "zod";
import { CLEARING_PARTS, type Clearing, type ClearingRequest } from "~/domain/clearing";
import type { Member } from "~/domain/permissions";
import { identifier } from "~/domain/plan-document/quantities";
import { db } from "../db/client";
import { screeningPool } from "./pool";
import { screeningLimitMs } from "./run-screening";
import { readScreening } from "./stored";
import { withinLimit } from "./within-limit";

/** One position instead of all that are flagged, and one part instead of all. */
export const clearingQuery = z.object({
  position: identifier.optional(),
  part: z.enum(CLEARING_PARTS).optional(),
});

/** Distances belong to circuits, so that a question about one position leaves them out. */
const requestOf = ({ position, part }: z.output<typeof clearingQuery>): ClearingRequest => ({
  sensorIds: position === undefined ? null : [position],
  parts: part ? [part] : CLEARING_PARTS.filter((each) => position === undefined || each !== "distances"),
});

/**
 * What would clear the flagged positions of a stored screening, worked out anew from its document.
 * @param signal aborted when nobody waits for the answer any more
 * @throws Refusal not-found; screening.timed-out; service.unavailable once `signal` is aborted
 */
export async function screeningClearing(
  member: Member,
  screeningId: string,
  query: z.output<typeof clearingQuery>,
  signal?: AbortSignal,
): Promise<Clearing> {
  const { document } = await readScreening(db(), member.organisationId, screeningId);
  return withinLimit((ending) => screeningPool().clearing(document, requestOf(query), ending), signal, {
    limitMs: screeningLimitMs,
    givenUp: "The request was given up before it was worked out what would clear the positions.",
    tooLong: `It took longer than ${String(screeningLimitMs / 1000)} s to work out what would clear the positions, and was stopped. Ask for one position or one part at a time.`,
  });
}
