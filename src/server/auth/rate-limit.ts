import { Refusal } from "~/domain/errors";
import { db } from "../db/client";
import { attemptsIn, countAttempt, takeAttemptBack } from "../db/queries/rate-limits";
import { type RateLimit, waitBeforeNextMs, windowStart } from "./rate-window";
import { hashOf } from "./secrets";

const minuteMs = 60_000;

const rates = {
  "sign-in": { limit: 10, windowMs: minuteMs },
  "sign-in-return": { limit: 10, windowMs: minuteMs },
  "sign-in-mail": { limit: 5, windowMs: 60 * minuteMs },
  invitation: { limit: 40, windowMs: 60 * minuteMs },
  "invitation-mail": { limit: 3, windowMs: 60 * minuteMs },
} as const satisfies Record<string, RateLimit>;

export type LimitedDeed = keyof typeof rates;

/**
 * Counts an attempt at `deed` by `key` (an address, a network, a pending sign-in; stored as a hash).
 * @throws Refusal rate.exceeded with `retryAfterS`
 */
export async function limitRate(deed: LimitedDeed, key: string, now = new Date()): Promise<void> {
  const rate: RateLimit = rates[deed];
  const bucket = `${deed}:${hashOf(key)}`;
  const startedAt = windowStart(now, rate);
  const ordinal = await countAttempt(db(), bucket, startedAt);
  const previous = await attemptsIn(db(), bucket, new Date(startedAt.getTime() - rate.windowMs));
  const waitMs = waitBeforeNextMs({ current: ordinal - 1, previous }, rate, now);
  if (waitMs === 0) return;
  // A refused attempt does not count, or hammering would lock an address out for good.
  await takeAttemptBack(db(), bucket, startedAt);
  const retryAfterS = Math.max(1, Math.ceil(waitMs / 1000));
  throw new Refusal("rate.exceeded", `Too many attempts. Wait ${waitInWords(retryAfterS)} and try again.`, {
    detail: { retryAfterS },
  });
}

const waitInWords = (waitS: number): string =>
  waitS < 90 ? `${String(waitS)} s` : `${String(Math.ceil(waitS / 60))} minutes`;
