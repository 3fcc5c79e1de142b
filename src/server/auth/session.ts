import type { AstroCookies } from "astro";
import type { Principal } from "~/domain/permissions";
import { db, type Queryable } from "../db/client";
import { rolesOf, siteIdsOf } from "../db/queries/people";
import {
  deleteSession,
  findSession,
  insertSession,
  renameSession,
  touchSession,
} from "../db/queries/sessions";
import { readCookie, removeCookie, sessionCookieName, setCookie } from "./cookies";
import { hashOf, newToken } from "./secrets";
import { sessionAbsoluteMs, sessionHasEnded, sessionNeedsTouch } from "./session-lifetime";

interface SignedIn {
  principal: Principal;
  /** Hash of the session token. */
  sessionId: string | null;
  authenticatedAt: Date | null;
}

const nobody: SignedIn = { principal: { kind: "anonymous" }, sessionId: null, authenticatedAt: null };

/** What the request's session cookie stands for; anonymous when there is none or it has ended. */
export async function principalOf(cookies: AstroCookies, now = new Date()): Promise<SignedIn> {
  const token = readCookie(cookies, sessionCookieName());
  if (token === null) return nobody;
  const found = await findSession(db(), hashOf(token));
  if (found === undefined || found.person.removedAt !== null || sessionHasEnded(found.session, now)) {
    if (found !== undefined) await deleteSession(db(), found.session.id);
    removeCookie(cookies, sessionCookieName());
    return nobody;
  }
  const { session, person } = found;
  if (sessionNeedsTouch(session, now)) await touchSession(db(), session.id, now);
  return {
    principal: {
      kind: "member",
      userId: person.id,
      organisationId: person.organisationId,
      name: person.name,
      roles: await rolesOf(db(), person.id),
      siteIds: await siteIdsOf(db(), person.id),
    },
    sessionId: session.id,
    authenticatedAt: session.authenticatedAt,
  };
}

/**
 * Begins a session for somebody who has just proved who they are.
 * @param authenticatedAt when they proved it: with a provider that may be long before
 * @returns the token for their cookie; only its hash is kept
 */
export async function createSession(
  db: Queryable,
  userId: string,
  now = new Date(),
  authenticatedAt = now,
): Promise<string> {
  const token = newToken();
  await insertSession(db, {
    id: hashOf(token),
    userId,
    createdAt: now,
    lastSeenAt: now,
    expiresAt: new Date(now.getTime() + sessionAbsoluteMs),
    authenticatedAt,
  });
  return token;
}

/**
 * Gives a session a new token, as must happen when what it allows changes.
 * @returns null when the session has ended meanwhile
 */
export async function renewSession(db: Queryable, sessionId: string): Promise<string | null> {
  const token = newToken();
  return (await renameSession(db, sessionId, hashOf(token))) ? token : null;
}

export const giveSessionCookie = (cookies: AstroCookies, token: string): void => {
  setCookie(cookies, sessionCookieName(), token, sessionAbsoluteMs);
};
