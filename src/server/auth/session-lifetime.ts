const minuteMs = 60_000;

/** A session ends this long after the last request of its browser. */
export const sessionIdleMs = 30 * minuteMs;

/** A session ends this long after it began, however busy. */
export const sessionAbsoluteMs = 12 * 60 * minuteMs;

/** How stale the note of the last request may become before it is written again. */
export const sessionTouchMs = minuteMs;

interface Lifetime {
  lastSeenAt: Date;
  expiresAt: Date;
}

export const sessionHasEnded = ({ lastSeenAt, expiresAt }: Lifetime, now: Date): boolean =>
  now >= expiresAt || now.getTime() - lastSeenAt.getTime() >= sessionIdleMs;

export const sessionNeedsTouch = ({ lastSeenAt }: Lifetime, now: Date): boolean =>
  now.getTime() - lastSeenAt.getTime() >= sessionTouchMs;
