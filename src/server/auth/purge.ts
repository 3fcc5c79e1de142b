import { db } from "../db/client";
import { deleteWindowsBefore } from "../db/queries/rate-limits";
import { deleteExpiredSessions } from "../db/queries/sessions";
import { deleteExpiredPendingSignIns, deleteExpiredSignInLinks } from "../db/queries/sign-ins";
import { log } from "../log";
import { longestWindowMs } from "./rate-limit";

/** A used link stays this long after its end, so that whoever opens it again is told that it was used. */
const linkMemoryMs = 24 * 60 * 60_000;

/** Removes what nobody can use any more. Nothing depends on it, so a failure is only logged. */
export async function purgeExpired(now = new Date()): Promise<void> {
  try {
    await deleteExpiredSessions(db(), now);
    await deleteExpiredPendingSignIns(db(), now);
    await deleteExpiredSignInLinks(db(), new Date(now.getTime() - linkMemoryMs));
    await deleteWindowsBefore(db(), new Date(now.getTime() - longestWindowMs));
  } catch (error) {
    log().warn({ error: error instanceof Error ? error.name : typeof error }, "expired sign-ins not purged");
  }
}
