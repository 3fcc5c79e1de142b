import { nextAttemptAt } from "~/domain/delivery";
import type { DeliveryRow } from "../db/queries/deliveries";
import { judgeFailure, keptAnswer } from "../mail/failure";

export type Outcome =
  | { state: "sent"; lastAnswer: string; sentAt: Date }
  | { state: "waiting"; lastAnswer: string; nextAttemptAt: Date }
  | { state: "failed"; lastAnswer: string };

/** Nobody waits longer than this for a link to sign in; they have asked for another one. */
const signInPatienceMs = 60 * 60_000;

export const sent = (answer: string, now: Date): Outcome => ({
  state: "sent",
  lastAnswer: keptAnswer(answer),
  sentAt: now,
});

/** What becomes of a message that could not be sent: tried again later, or given up. */
export function afterFailure(
  { kind, attempts, createdAt }: Pick<DeliveryRow, "kind" | "attempts" | "createdAt">,
  error: unknown,
  now: Date,
): Outcome {
  const { isFinal, answer } = judgeFailure(error);
  const next = isFinal ? null : nextAttemptAt(attempts, now);
  const isTooLate =
    next !== null && kind === "sign-in-link" && next.getTime() > createdAt.getTime() + signInPatienceMs;
  return next === null || isTooLate
    ? { state: "failed", lastAnswer: answer }
    : { state: "waiting", lastAnswer: answer, nextAttemptAt: next };
}
