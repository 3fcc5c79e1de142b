import { describe, expect, it } from "vitest";
import { sessionHasEnded, sessionNeedsTouch } from "./session-lifetime";

const minutes = (count: number, ms = 0) => new Date(1_800_000_000_000 + count * 60_000 + ms);

describe("a session", () => {
  const session = { lastSeenAt: minutes(0), expiresAt: minutes(12 * 60) };

  it("lives for less than 30 idle minutes", () => {
    expect(sessionHasEnded(session, minutes(30, -1))).toBe(false);
    expect(sessionHasEnded(session, minutes(30))).toBe(true);
  });

  it("ends after 12 hours, however busy", () => {
    const busy = { ...session, lastSeenAt: minutes(12 * 60 - 1) };
    expect(sessionHasEnded(busy, minutes(12 * 60, -1))).toBe(false);
    expect(sessionHasEnded(busy, minutes(12 * 60))).toBe(true);
  });

  it("is noted as used at most once a minute", () => {
    expect(sessionNeedsTouch(session, minutes(1, -1))).toBe(false);
    expect(sessionNeedsTouch(session, minutes(1))).toBe(true);
  });
});
