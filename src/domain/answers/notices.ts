import * as z from "zod";
import { deliveryKinds, deliveryStates } from "../delivery";
import { instant } from "./common";

export const issuedAnswer = z.object({ issuedAt: instant, recipients: z.int() });

/** `draftTag` stands for what the draft now says; the next change names it. */
export const draftChangedAnswer = z.object({ id: z.uuid(), draftTag: z.string() });

export const deliveriesAnswer = z.object({
  deliveries: z.array(
    z.object({
      id: z.uuid(),
      kind: z.enum(deliveryKinds),
      recipientName: z.string(),
      email: z.string(),
      state: z.enum(deliveryStates),
      attempts: z.int(),
      nextAttemptAt: instant.nullable(),
      sentAt: instant.nullable(),
      /** The mail server's last answer, without addresses. */
      lastAnswer: z.string().nullable(),
      createdAt: instant,
    }),
  ),
});
