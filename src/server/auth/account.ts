import type { AstroCookies } from "astro";
import type { Member } from "~/domain/permissions";
import type { Role } from "~/domain/roles";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { findUser } from "../db/queries/people";
import { deleteSession, deleteSessionsOf, listSessions } from "../db/queries/sessions";
import { removeCookie, sessionCookieName } from "./cookies";
import { sessionIdleMs } from "./session-lifetime";

export interface AccountView {
  name: string;
  email: string;
  roles: readonly Role[];
  /** The last used first. */
  sessions: { createdAt: Date; lastSeenAt: Date; isThis: boolean }[];
}

export async function accountView(member: Member, sessionId: string | null): Promise<AccountView> {
  const now = new Date();
  const person = await findUser(db(), member.userId);
  const seenAfter = new Date(now.getTime() - sessionIdleMs);
  const sessions = await listSessions(db(), member.userId, seenAfter, now);
  return {
    name: member.name,
    email: person?.email ?? "",
    roles: member.roles,
    sessions: sessions.map(({ id, createdAt, lastSeenAt }) => ({
      createdAt,
      lastSeenAt,
      isThis: id === sessionId,
    })),
  };
}

/** Ends this browser's session. */
export async function signOut(member: Member, sessionId: string, cookies: AstroCookies): Promise<void> {
  await db().transaction(async (tx) => {
    if (await deleteSession(tx, sessionId)) await recordEnd(tx, member, "session.ended", {});
  });
  removeCookie(cookies, sessionCookieName());
}

/** Ends every session of the person, this one too. */
export async function signOutEverywhere(member: Member, cookies: AstroCookies): Promise<void> {
  await db().transaction(async (tx) => {
    const sessions = await deleteSessionsOf(tx, member.userId);
    await recordEnd(tx, member, "session.all-ended", { sessions });
  });
  removeCookie(cookies, sessionCookieName());
}

const recordEnd = (
  tx: Parameters<typeof recordActivity>[0],
  { organisationId, userId }: Member,
  event: "session.ended" | "session.all-ended",
  detail: Record<string, unknown>,
): Promise<void> =>
  recordActivity(tx, {
    organisationId,
    actorId: userId,
    event,
    subjectKind: "session",
    subjectId: null,
    detail,
  });
