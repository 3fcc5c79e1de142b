import { z } from "zod";
import { type DeliveryKind, deliveryKinds, type DeliveryState, deliveryStates } from "~/domain/delivery";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import { type DeliveryRow, listDeliveries, lockDelivery, updateDelivery } from "../db/queries/deliveries";

const shownAtOnce = 200;

/** Of an address; what cannot be used is passed over. */
const filterSchema = z.object({
  state: z.enum(deliveryStates).optional().catch(undefined),
  kind: z.enum(deliveryKinds).optional().catch(undefined),
  to: z
    .string()
    .trim()
    .max(254)
    .transform((text) => (text === "" ? undefined : text))
    .optional()
    .catch(undefined),
});

export interface DeliveryFilter {
  state?: DeliveryState | undefined;
  kind?: DeliveryKind | undefined;
  /** Part of a recipient's name or address. */
  to?: string | undefined;
}

export const deliveryFilterOf = (query: URLSearchParams): DeliveryFilter =>
  filterSchema.parse(Object.fromEntries(query));

/** The newest messages that match, and whether there are more. */
export async function deliveriesOf({ organisationId }: Member, filter: DeliveryFilter) {
  const rows = await listDeliveries(db(), organisationId, shownAtOnce + 1, filter);
  return { deliveries: rows.slice(0, shownAtOnce), hasMore: rows.length > shownAtOnce };
}

/**
 * Has a message sent at once that waits for its next attempt or has failed.
 * @throws Refusal state.conflict
 */
export async function tryAgainNow(
  actor: Member,
  { id }: Pick<DeliveryRow, "id">,
  now = new Date(),
): Promise<void> {
  await settleByHand(actor, id, "delivery.tried-again", async (tx, row) => {
    if (row.kind === "sign-in-link" && row.state === "failed")
      throw conflict("Nobody waits for this sign-in link any more. Whoever needs one asks for another.");
    await updateDelivery(tx, id, { state: "waiting", nextAttemptAt: now, claimedUntil: null });
  });
}

/** Stops further attempts at a message that waits. @throws Refusal state.conflict */
export async function giveUp(actor: Member, { id }: Pick<DeliveryRow, "id">): Promise<void> {
  await settleByHand(actor, id, "delivery.given-up", async (tx, row) => {
    if (row.state === "failed") throw conflict("This message has failed already; it is not tried again.");
    await updateDelivery(tx, id, { state: "failed", claimedUntil: null });
  });
}

const conflict = (message: string) => new Refusal("state.conflict", message);

async function settleByHand(
  { organisationId, userId }: Member,
  id: string,
  event: "delivery.tried-again" | "delivery.given-up",
  write: (tx: Queryable, row: DeliveryRow) => Promise<void>,
): Promise<void> {
  await db().transaction(async (tx) => {
    const row = await lockDelivery(tx, organisationId, id);
    if (row === undefined || row.state === "sent")
      throw conflict("The mail server has taken this message already. Reload the page to see.");
    if (row.claimedUntil !== null && row.claimedUntil > new Date())
      throw conflict("This message is being sent at this moment. Reload the page in a minute.");
    await write(tx, row);
    await recordActivity(tx, {
      organisationId,
      actorId: userId,
      event,
      subjectKind: "delivery",
      subjectId: id,
      detail: { kind: row.kind, attempts: row.attempts },
    });
  });
}
