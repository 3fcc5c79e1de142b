const minuteMs = 60_000;
const hourMs = 60 * minuteMs;
const dayMs = 24 * hourMs;

/**
 * How long each kind of data is kept: the one place. `afterMs` counts from what `from` says; null where nothing is deleted by
 * itself. The delivery worker deletes by this table every hour, and the organisation's page shows it.
 */
export const retention = {
  sessions: {
    what: "Sessions",
    afterMs: 0,
    from: "after they end, 30 minutes without use or 12 hours after signing in",
  },
  signInsUnderWay: {
    what: "Sign-ins and acceptances under way",
    afterMs: 0,
    from: "after ten minutes",
  },
  signInLinks: { what: "Sign-in links, as hashes", afterMs: dayMs, from: "after they run out" },
  invitations: {
    what: "Invitations with name and address",
    afterMs: 90 * dayMs,
    from: "after they are accepted or withdrawn, or were made and no link works any more",
  },
  attempts: {
    what: "Counts of attempts, without addresses",
    afterMs: 2 * hourMs,
    from: "after the attempt",
  },
  signInMails: {
    what: "Outbox rows of sign-in mails",
    afterMs: 7 * dayMs,
    from: "after they were written, once sent or failed",
  },
  notices: {
    what: "Notices and their deliveries",
    afterMs: null,
    from: "kept: they show who was told what",
  },
  screenings: {
    what: "Screenings that nothing refers to",
    afterMs: 90 * dayMs,
    from: "after screening, unless a notice or a revision was made from it or it is the plan’s latest",
  },
  drawings: {
    what: "Drawings that nothing refers to",
    afterMs: 30 * dayMs,
    from: "after the upload, unless the working copy, a screening or a revision shows it",
  },
  strayObjects: {
    what: "Stored files without a record",
    afterMs: dayMs,
    from: "after they were stored",
  },
  members: {
    what: "Names and addresses of former members",
    afterMs: null,
    from: "kept with their work until an admin erases them",
  },
  activity: {
    what: "The activity log",
    afterMs: null,
    from: "kept as long as the organisation; it holds ids of people, no names",
  },
} as const satisfies Record<string, { what: string; afterMs: number | null; from: string }>;

export type RetainedKind = keyof typeof retention;

type Deleted = {
  [K in RetainedKind]: (typeof retention)[K]["afterMs"] extends null ? never : K;
}[RetainedKind];

/** What is older than this is deleted. */
export const keptSince = (kind: Deleted, now: Date): Date =>
  new Date(now.getTime() - retention[kind].afterMs);

/** How long, in words: `7 days`, `at once`; null where nothing is deleted by itself. */
export function retentionInWords(kind: RetainedKind): string | null {
  const { afterMs }: { afterMs: number | null } = retention[kind];
  if (afterMs === null) return null;
  if (afterMs === 0) return "at once";
  const [count, unit] = afterMs % dayMs === 0 ? [afterMs / dayMs, "day"] : [afterMs / hourMs, "hour"];
  return `${String(count)} ${unit}${count === 1 ? "" : "s"}`;
}
