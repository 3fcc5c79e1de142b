import { Refusal } from "~/domain/errors";
import { freshSignInMs } from "~/domain/revision";

export const signsInAfresh = (returnTo: string): string =>
  `/api/sign-in/start?fresh=1&returnTo=${encodeURIComponent(returnTo)}`;

export const isFreshSignIn = (authenticatedAt: Date | null, now: Date): boolean =>
  authenticatedAt !== null && now.getTime() - authenticatedAt.getTime() <= freshSignInMs;

/**
 * Refuses what needs a sign-in of the last minutes; the refusal's detail has the way to one.
 * @param page to come back to
 * @throws Refusal sign-in.too-old
 */
export function requireFreshSignIn(authenticatedAt: Date | null, page: string, now = new Date()): void {
  if (isFreshSignIn(authenticatedAt, now)) return;
  throw new Refusal(
    "sign-in.too-old",
    `This is signed with your name, so it needs a sign-in that is not older than ${String(freshSignInMs / 60_000)} minutes. Sign in again, then repeat it; nothing was changed.`,
    { detail: { signInAgain: signsInAfresh(page) } },
  );
}
