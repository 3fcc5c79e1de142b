import { z } from "zod";
import { type ActivityEvent, activityEvents, activitySubjects } from "~/domain/activity";
import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { type ActivityFilter, findHead, listActivity } from "../db/queries/activity";
import { listPeople } from "../db/queries/people";

const shownAtOnce = 100;
const dayMs = 24 * 60 * 60_000;
const events = Object.keys(activityEvents) as [ActivityEvent, ...ActivityEvent[]];

/** An empty field of the filter's form says nothing. */
const optional = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === "" ? undefined : value), schema.optional());

/** What the filter's form sends; days are whole days in UTC, both included. */
export const activityFilterInput = z.object({
  actor: optional(z.union([z.uuid(), z.literal("service")])),
  event: optional(z.enum(events)),
  subject: optional(z.enum(activitySubjects)),
  subjectId: optional(z.uuid()),
  from: optional(z.iso.date()),
  to: optional(z.iso.date()),
  /** Lines before this one, to page on. */
  before: optional(z.coerce.number().int().positive()),
});

export type ActivityFilterInput = z.output<typeof activityFilterInput>;

/** The filter in the terms of the log. */
export function filterOf({
  actor,
  event,
  subject,
  subjectId,
  from,
  to,
}: ActivityFilterInput): ActivityFilter {
  return {
    actorId: actor === "service" ? null : actor,
    event,
    subjectKind: subject,
    subjectId,
    from: from === undefined ? undefined : new Date(from),
    until: to === undefined ? undefined : new Date(Date.parse(to) + dayMs),
  };
}

/** The newest lines that match, the head of the chain, and the people to filter by. */
export async function activityView({ organisationId }: Member, query: URLSearchParams) {
  const parsed = activityFilterInput.safeParse(Object.fromEntries(query));
  const input = parsed.success ? parsed.data : {};
  const { before } = input as ActivityFilterInput;
  const filter = filterOf(input as ActivityFilterInput);
  const rows = await listActivity(db(), organisationId, shownAtOnce + 1, filter, before);
  const lines = rows.slice(0, shownAtOnce);
  return {
    lines,
    /** Whether the filter could not be read and all lines are shown. */
    filterRefused: !parsed.success,
    filter: input as ActivityFilterInput,
    nextBefore: rows.length > shownAtOnce ? lines.at(-1)?.sequence : undefined,
    head: await headOf(organisationId),
    people: await listPeople(db(), organisationId),
  };
}

/** The newest line's place and hash. */
export async function headOf(organisationId: string): Promise<{ sequence: number; hash: string }> {
  const head = await findHead(db(), organisationId);
  if (head === undefined) throw new Error("The organisation's activity log has no head.");
  return head;
}
