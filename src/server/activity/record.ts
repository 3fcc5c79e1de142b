import type { ActivityEvent, ActivitySubject } from "~/domain/activity";
import type { Queryable } from "../db/client";
import { insertActivity } from "../db/queries/activity";

export interface Deed {
  organisationId: string;
  /** Null when the service itself acted. */
  actorId: string | null;
  event: ActivityEvent;
  subjectKind: ActivitySubject;
  subjectId: string | null;
  /** What changed; no secrets, no addresses. */
  detail?: Record<string, unknown>;
}

/** Adds a line to the activity log; call it in the transaction of the deed itself. */
export async function recordActivity(db: Queryable, deed: Deed): Promise<void> {
  await insertActivity(db, {
    ...deed,
    id: crypto.randomUUID(),
    at: new Date(),
    detail: JSON.stringify(deed.detail ?? {}),
  });
}
