import { keptSince } from "~/domain/retention";
import { db } from "../db/client";
import { deleteWindowsBefore } from "../db/queries/rate-limits";
import { deleteExpiredSessions } from "../db/queries/sessions";
import { deleteExpiredPendingSignIns, deleteExpiredSignInLinks } from "../db/queries/sign-ins";

/** Removes sessions, sign-ins under way, links and counts of attempts that are of no use any more. */
export async function purgeExpired(now = new Date()): Promise<void> {
  await deleteExpiredSessions(db(), keptSince("sessions", now));
  await deleteExpiredPendingSignIns(db(), keptSince("signInsUnderWay", now));
  // A link outlives its end, so that whoever opens it then is told what became of it.
  await deleteExpiredSignInLinks(db(), keptSince("signInLinks", now));
  await deleteWindowsBefore(db(), keptSince("attempts", now));
}
