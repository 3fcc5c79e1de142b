import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { claimDueDelivery, type DeliveryRow, settleDelivery } from "../db/queries/deliveries";
import { log } from "../log";
import { type MailTransport, sendLimitMs } from "../mail/transport";
import { messageOf } from "./message";
import { afterFailure, type Outcome, sent } from "./outcome";

/** Longer than a message may take; after that another worker may take it for abandoned. */
const claimMs = 2 * sendLimitMs;

/**
 * Sends the message that has been due longest, if any.
 *
 * The row is claimed in a transaction of its own and settled in another one after the mail server's answer. A process
 * that ends in between leaves the claim to run out; the message then goes again under the same Message-ID.
 * @returns whether there was one.
 */
export async function deliverNext(
  transport: MailTransport,
  now: () => Date = () => new Date(),
): Promise<boolean> {
  const claimed = await db().transaction(
    (tx) => {
      const at = now();
      return claimDueDelivery(tx, at, new Date(at.getTime() + claimMs));
    },
    // Under repeatable read the search would lock the gaps that new messages are written into.
    { isolationLevel: "read committed" },
  );
  if (claimed === undefined) return false;
  const outcome = await attempt(transport, claimed, now);
  await settle(claimed, outcome);
  return true;
}

async function attempt(transport: MailTransport, row: DeliveryRow, now: () => Date): Promise<Outcome> {
  const message = await messageOf(row, now());
  if (message === undefined)
    return { state: "failed", lastAnswer: "What this message was about is no longer there." };
  try {
    return sent(await transport.send(message), now());
  } catch (error) {
    return afterFailure(row, error, now());
  }
}

async function settle(row: DeliveryRow, outcome: Outcome): Promise<void> {
  await db().transaction(async (tx) => {
    const isOurs = await settleDelivery(tx, row, outcome);
    if (!isOurs || row.kind === "sign-in-link" || outcome.state === "waiting") return;
    await recordActivity(tx, {
      organisationId: row.organisationId,
      actorId: null,
      event: outcome.state === "sent" ? "delivery.sent" : "delivery.failed",
      subjectKind: "delivery",
      subjectId: row.id,
      detail: { attempts: row.attempts },
    });
  });
  log().info(
    {
      delivery: row.id,
      kind: row.kind,
      attempt: row.attempts,
      state: outcome.state,
      answer: outcome.lastAnswer,
    },
    "delivery attempted",
  );
}
