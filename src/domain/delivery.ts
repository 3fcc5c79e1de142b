/** waiting: to be sent or tried again; sent: the mail server took it; failed: refused for good or tried too often. */
export const deliveryStates = ["waiting", "sent", "failed"] as const;
export type DeliveryState = (typeof deliveryStates)[number];

/** What a message of the outbox is; tokens of sign-in links and invitations are made when it is sent. */
export const deliveryKinds = ["notice", "sign-in-link", "invitation", "revision"] as const;
export type DeliveryKind = (typeof deliveryKinds)[number];

const minuteMs = 60_000;

/** Waits before each further attempt; after the last one a delivery has failed. */
const retryWaitsMs = [minuteMs, 5 * minuteMs, 15 * minuteMs, 60 * minuteMs, 240 * minuteMs, 720 * minuteMs];

/**
 * When to try again after `attempts` attempts that the server put off.
 * @returns null when the attempts are used up.
 */
export function nextAttemptAt(attempts: number, now: Date): Date | null {
  const waitMs = retryWaitsMs[attempts - 1];
  return waitMs === undefined ? null : new Date(now.getTime() + waitMs);
}
