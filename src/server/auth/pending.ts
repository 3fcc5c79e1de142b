import type { AstroCookies } from "astro";
import { db, type Queryable } from "../db/client";
import { findPendingSignIn, insertPendingSignIn, type PendingSignIn } from "../db/queries/sign-ins";
import { pendingCookieName, readCookie, setCookie } from "./cookies";
import { hashOf, newToken } from "./secrets";

export const pendingLifetimeMs = 10 * 60_000;

/** Keeps a sign-in that is under way and binds it to this browser; one that it had before is forgotten with its cookie. */
export async function keepPending(
  db: Queryable,
  cookies: AstroCookies,
  pending: Omit<PendingSignIn, "id" | "expiresAt">,
): Promise<void> {
  const token = newToken();
  const expiresAt = new Date(Date.now() + pendingLifetimeMs);
  await insertPendingSignIn(db, { ...pending, id: hashOf(token), expiresAt });
  setCookie(cookies, pendingCookieName(), token, pendingLifetimeMs);
}

/** The sign-in that this browser has under way. */
export async function pendingOf(cookies: AstroCookies): Promise<PendingSignIn | undefined> {
  const token = readCookie(cookies, pendingCookieName());
  return token === null ? undefined : findPendingSignIn(db(), hashOf(token), new Date());
}
