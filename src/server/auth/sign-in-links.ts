import type { AstroCookies } from "astro";
import { z } from "zod";
import { Refusal } from "~/domain/errors";
import { db, type Queryable } from "../db/client";
import { insertDeliveries } from "../db/queries/deliveries";
import { findByEmail, findUser } from "../db/queries/people";
import { findSignInLink, insertSignInLink, takeSignInLink } from "../db/queries/sign-ins";
import { env } from "../env";
import { limitRate } from "./rate-limit";
import { safeReturnTo } from "./return-to";
import { hashOf, newToken } from "./secrets";
import { type NextStep, type Proof, signIn } from "./sign-in";

const linkLifetimeMs = 10 * 60_000;

/** No answer comes sooner, so that how long it takes does not tell whether the address is known. */
const answerAfterMs = 250;

const emailSchema = z.string().trim().toLowerCase().pipe(z.email().max(254));

/**
 * Puts a sign-in mail into the outbox for each person of that address, one in each organisation. Known and unknown
 * addresses are answered alike.
 * @throws Refusal input.refused, rate.exceeded
 */
export async function requestSignInMail(typedEmail: string): Promise<void> {
  const parsed = emailSchema.safeParse(typedEmail);
  if (!parsed.success)
    throw new Refusal("input.refused", "That is not an e-mail address. Check it and try again.", {
      faults: [{ path: "email", message: "Enter an address such as name@company.example." }],
    });
  const email = parsed.data;
  await limitRate("sign-in-mail", email);
  const [outcome] = await Promise.allSettled([writeSignInMails(email), delay(answerAfterMs)]);
  if (outcome.status === "rejected") throw outcome.reason;
}

async function writeSignInMails(email: string): Promise<void> {
  const people = await findByEmail(db(), email);
  const host = new URL(env().appOrigin).hostname;
  const now = new Date();
  await insertDeliveries(
    db(),
    people.map(({ userId, organisationId }) => ({
      id: crypto.randomUUID(),
      organisationId,
      kind: "sign-in-link",
      userId,
      messageId: `${crypto.randomUUID()}@${host}`,
      state: "waiting",
      attempts: 0,
      nextAttemptAt: now,
      createdAt: now,
    })),
  );
}

const delay = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

/** Makes a one-time link for a person; the caller mails it to them and forgets it. Only its hash is kept. */
export async function mintSignInLink(
  db: Queryable,
  userId: string,
  now = new Date(),
): Promise<{ url: string; expiresAt: Date }> {
  const token = newToken();
  const expiresAt = new Date(now.getTime() + linkLifetimeMs);
  await insertSignInLink(db, { id: hashOf(token), userId, createdAt: now, expiresAt });
  return { url: `${env().appOrigin}/sign-in/link?token=${token}`, expiresAt };
}

/** Uses a link up: whoever comes first gets the person, everybody after them a problem. */
export async function redeemSignInLink(db: Queryable, token: string, now = new Date()): Promise<Proof> {
  const id = hashOf(token);
  const taken = await takeSignInLink(db, id, now);
  const link = await findSignInLink(db, id);
  if (link === undefined) return { problem: "link-unusable" };
  if (!taken) return { problem: link.usedAt === null ? "link-expired" : "link-used" };
  const person = await findUser(db, link.userId);
  return person === undefined || person.removedAt !== null
    ? { problem: "link-unusable" }
    : { userId: person.id, organisationId: person.organisationId, by: "link", authenticatedAt: new Date() };
}

/** Signs in whoever holds a link's token. */
export async function signInByLink(
  cookies: AstroCookies,
  token: string,
  returnTo: string | undefined,
): Promise<NextStep> {
  const problem = await signIn(cookies, (tx) => redeemSignInLink(tx, token));
  return problem === null ? { goTo: safeReturnTo(returnTo) } : { problem };
}
