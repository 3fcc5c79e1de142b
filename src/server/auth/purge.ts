import { db } from "../db/client";
import { deleteWindowsBefore } from "../db/queries/rate-limits";
import { deleteExpiredSessions } from "../db/queries/sessions";
import { deleteExpiredPendingSignIns, deleteExpiredSignInLinks } from "../db/queries/sign-ins";
import { longestWindowMs } from "./rate-limit";

/** A link stays this long after its end, so that whoever opens it then is told what became of it. */
const linkMemoryMs = 24 * 60 * 60_000;

/** Removes sessions, sign-ins under way, links and counts of attempts that are of no use any more. */
export async function purgeExpired(now = new Date()): Promise<void> {
  await deleteExpiredSessions(db(), now);
  await deleteExpiredPendingSignIns(db(), now);
  await deleteExpiredSignInLinks(db(), new Date(now.getTime() - linkMemoryMs));
  await deleteWindowsBefore(db(), new Date(now.getTime() - longestWindowMs));
}
