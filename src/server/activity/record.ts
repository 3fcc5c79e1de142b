import type { ActivityEvent, ActivitySubject } from "~/domain/activity";
import type { Queryable } from "../db/client";
import { insertActivity, lockHead, moveHead } from "../db/queries/activity";
import { hashOfLine } from "./chain";

export interface Deed {
  organisationId: string;
  /** Null when the service itself acted. */
  actorId: string | null;
  event: ActivityEvent;
  subjectKind: ActivitySubject;
  subjectId: string | null;
  /** What changed; no secrets, no addresses, no names of people. */
  detail?: Record<string, unknown>;
}

/**
 * Adds a line to the organisation's activity log. Call it in the transaction of the deed itself, and after everything
 * else that locks: until that transaction ends nobody else of the organisation can add a line.
 */
export async function recordActivity(tx: Queryable, deed: Deed): Promise<void> {
  const { organisationId, actorId, event, subjectKind, subjectId, detail = {} } = deed;
  const head = await lockHead(tx, organisationId);
  const fields = {
    organisationId,
    sequence: head.sequence + 1,
    at: new Date(),
    actorId,
    event,
    subjectKind,
    subjectId,
    detail: JSON.stringify(detail),
    previousHash: head.hash,
  };
  const hash = hashOfLine(fields);
  await insertActivity(tx, { ...fields, id: crypto.randomUUID(), hash });
  await moveHead(tx, organisationId, { sequence: fields.sequence, hash });
}
