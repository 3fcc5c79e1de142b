/** At most `limit` attempts in any stretch of `windowMs`. */
export interface RateLimit {
  limit: number;
  windowMs: number;
}

/** Attempts that were allowed: in the window that `now` lies in, before the one being judged, and in the window before it. */
export interface Attempts {
  current: number;
  previous: number;
}

export const windowStart = (now: Date, { windowMs }: RateLimit): Date =>
  new Date(Math.floor(now.getTime() / windowMs) * windowMs);

/**
 * Judges one more attempt by a sliding estimate: those of this window and the share of the last window's that still lies
 * within `windowMs`.
 * @returns 0 when the attempt is allowed, otherwise the time in ms after which one will be
 */
export function waitBeforeNextMs({ current, previous }: Attempts, rate: RateLimit, now: Date): number {
  const { limit, windowMs } = rate;
  const elapsedMs = now.getTime() - windowStart(now, rate).getTime();
  const room = limit - 1 - current;
  if (previous * (1 - elapsedMs / windowMs) <= room) return 0;
  // The last window's share falls until this one ends; then this one's begins to.
  const shareThatFits = room / previous;
  if (room >= 0 && shareThatFits > 0) return (1 - shareThatFits) * windowMs - elapsedMs;
  const shareThatFitsNext = current === 0 ? 1 : Math.min(1, (limit - 1) / current);
  return windowMs - elapsedMs + (1 - shareThatFitsNext) * windowMs;
}
