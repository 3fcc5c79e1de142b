import type { AstroCookies } from "astro";
import type { SignInProblem } from "~/domain/sign-in-problems";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import { deleteSession } from "../db/queries/sessions";
import { readCookie, sessionCookieName } from "./cookies";
import { hashOf } from "./secrets";
import { createSession, giveSessionCookie } from "./session";

/** Who somebody has proved to be and by what, or why they have not. */
export type Proof<P extends string = SignInProblem> =
  | {
      userId: string;
      organisationId: string;
      by: "provider" | "link";
      /** When they proved it; null where the provider does not say. */
      authenticatedAt?: Date | null;
    }
  | { problem: P };

/** A proof of unknown age does not pass for a fresh one. */
const longAgo = new Date(0);

/** Where the browser goes next, or why it cannot sign in. */
export type NextStep = { goTo: string } | { problem: SignInProblem };

/**
 * Begins a session under a new id for whoever `prove` finds, in one transaction with it; the session that the browser
 * had before ends.
 * @returns the problem when there is no proof, otherwise null
 */
export async function signIn<P extends string = SignInProblem>(
  cookies: AstroCookies,
  prove: (tx: Queryable) => Promise<Proof<P>>,
): Promise<P | null> {
  const before = readCookie(cookies, sessionCookieName());
  const outcome = await db().transaction(async (tx) => {
    const proof = await prove(tx);
    if ("problem" in proof) return proof;
    const { userId, organisationId, by, authenticatedAt } = proof;
    if (before !== null) await deleteSession(tx, hashOf(before));
    const token = await createSession(tx, userId, new Date(), authenticatedAt ?? longAgo);
    await recordActivity(tx, {
      organisationId,
      actorId: userId,
      event: "session.started",
      subjectKind: "session",
      subjectId: null,
      detail: { by },
    });
    return { token };
  });
  if ("problem" in outcome) return outcome.problem;
  giveSessionCookie(cookies, outcome.token);
  return null;
}
