/** At most `limit` attempts in any stretch of `windowMs`. */
export interface RateLimit {
  limit: number;
  windowMs: number;
}

/** Attempts in the window that `now` lies in (the one being judged included) and in the window before it. */
export interface Attempts {
  current: number;
  previous: number;
}

export const windowStart = (now: Date, { windowMs }: RateLimit): Date =>
  new Date(Math.floor(now.getTime() / windowMs) * windowMs);

/**
 * Judges an attempt by a sliding estimate: those of this window and the share of the last window's that still lies
 * within `windowMs`. Refused attempts count up to the limit only, so that hammering does not lock anybody out for longer.
 * @returns 0 when the attempt is allowed, otherwise the time in ms after which the next one will be
 */
export function waitBeforeNextMs(attempts: Attempts, rate: RateLimit, now: Date): number {
  const { limit, windowMs } = rate;
  const elapsedMs = now.getTime() - windowStart(now, rate).getTime();
  const previous = Math.min(attempts.previous, limit);
  const stillCounted = previous * (1 - elapsedMs / windowMs);
  if (attempts.current + stillCounted <= limit) return 0;
  const current = Math.min(attempts.current, limit);
  // The refused attempt itself is among `current` and stays counted; one more has to fit.
  const roomNow = limit - current - 1;
  if (roomNow >= 0 && previous > 0) {
    const freeAtMs = (1 - roomNow / previous) * windowMs;
    if (freeAtMs > elapsedMs && freeAtMs < windowMs) return freeAtMs - elapsedMs;
  }
  const shareToFall = Math.max(0, 1 - (limit - 1) / current);
  return windowMs - elapsedMs + shareToFall * windowMs;
}
