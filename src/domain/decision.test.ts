import { describe, expect, it } from "vitest";
import { calendarDay, concessionHasEnded, dispositionOf, reminderDue } from "./decision";

describe("dispositionOf", () => {
  it("releases what is within, and lets a flagged position wait for its decision", () => {
    expect(dispositionOf("within", undefined)).toBe("released");
    expect(dispositionOf("undecided", undefined)).toBe("waiting");
    expect(dispositionOf("over", { kind: "concession" })).toBe("concession");
  });
});

describe("a concession", () => {
  it("holds through its last day on the site's calendar", () => {
    const lateInUtc = new Date("2026-12-01T23:30:00Z");
    expect(calendarDay(lateInUtc, "Europe/Berlin")).toBe("2026-12-02");
    expect(calendarDay(lateInUtc, "America/Lima")).toBe("2026-12-01");
    expect(concessionHasEnded("2026-12-01", "2026-12-01")).toBe(false);
    expect(concessionHasEnded("2026-12-01", "2026-12-02")).toBe(true);
  });

  it("is told of 30 and 7 days before, and not of a day that had passed when it was granted", () => {
    const due = (today: string, grantedOn = "2026-01-01") => reminderDue("2026-12-31", grantedOn, today);
    expect(due("2026-11-30")).toBe(null);
    expect(due("2026-12-01")).toBe(30);
    expect(due("2026-12-23")).toBe(30);
    expect(due("2026-12-24")).toBe(7);
    expect(due("2027-01-01")).toBe(null);
    expect(due("2026-12-20", "2026-12-15")).toBe(null);
    expect(due("2026-12-25", "2026-12-15")).toBe(7);
  });
});
