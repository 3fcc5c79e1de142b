import { keptSince } from "~/domain/retention";
import { purgeExpired } from "../auth/purge";
import { db } from "../db/client";
import { deleteSettledSignInDeliveries } from "../db/queries/deliveries";
import { deleteOldInvitations } from "../db/queries/invitations";
import { deleteUnreferencedDrawings, deleteUnreferencedScreenings } from "../db/queries/retention";
import { errorReport } from "../error-report";
import { log } from "../log";
import { sweepStrayObjects } from "./stray-objects";

const chores: Record<string, (now: Date) => Promise<void>> = {
  "sign-ins": purgeExpired,
  "sign-in mails": (now) => deleteSettledSignInDeliveries(db(), keptSince("signInMails", now)),
  invitations: (now) => deleteOldInvitations(db(), keptSince("invitations", now), now),
  screenings: (now) => deleteUnreferencedScreenings(db(), keptSince("screenings", now)),
  // Before the objects: what they leave in the store is without a record then.
  drawings: (now) => deleteUnreferencedDrawings(db(), keptSince("drawings", now)),
  "stray objects": (now) => sweepStrayObjects(keptSince("strayObjects", now)),
};

/** Deletes what the table of retention says. A chore that fails is logged, holds up no other, and is done the next time. */
export async function purgeByRetention(now = new Date()): Promise<void> {
  for (const [chore, run] of Object.entries(chores))
    try {
      await run(now);
    } catch (error) {
      log().error({ chore, ...errorReport(error) }, "old data could not be deleted; trying again in an hour");
    }
}
