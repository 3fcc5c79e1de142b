import { env } from "../env";

/** A new Message-ID without its angle brackets (RFC 5322, 3.6.4): kept with the outbox row, so that retries repeat it. */
export const newMessageId = (): string => `${crypto.randomUUID()}@${new URL(env().appOrigin).hostname}`;
