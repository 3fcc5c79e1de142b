import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { leaveStatelessPlace, takeStatelessPlace } from "../db/queries/screenings";
import { runScreening, screeningLimitMs } from "./run-screening";

/** A place that was not given back is free again a little after the longest screening would have ended. */
const placeMs = screeningLimitMs + 15_000;

/**
 * Screens a document that is kept nowhere, one at a time for each person over all processes.
 * @returns the result's text, the same bytes as a stored screening of the document
 * @throws Refusal document.refused with faults; request.malformed; screening.busy; screening.timed-out
 */
export async function screenDocument(member: Member, text: string, signal?: AbortSignal): Promise<string> {
  const runId = crypto.randomUUID();
  const now = new Date();
  const place = { userId: member.userId, runId, now, expiresAt: new Date(now.getTime() + placeMs) };
  if (!(await takeStatelessPlace(db(), place)))
    throw new Refusal(
      "screening.busy",
      "A screening of yours is still running. Wait for its answer, or give it up, and send this one again.",
      { detail: { retryAfterS: 5 } },
    );
  try {
    return (await runScreening(text, signal)).text;
  } finally {
    await leaveStatelessPlace(db(), member.userId, runId);
  }
}
