import * as z from "zod";
import { requiredText, plainText } from "./plain-text";
import type { Verdict } from "./screening-result";

/** What an auditor may decide on a position that is undecided or over. */
export const decisionKinds = ["concession", "held", "not-released"] as const;
export type DecisionKind = (typeof decisionKinds)[number];

/** What holds for a position of a revision: within is released, a flagged one waits until it is decided. */
export type Disposition = "released" | DecisionKind | "waiting";

export const dispositionWords: Record<Disposition, string> = {
  released: "released",
  concession: "released under concession",
  held: "held, verify on site",
  "not-released": "not released",
  waiting: "waits for a decision",
};

export const isFlagged = (verdict: Verdict): boolean => verdict !== "within";

export const dispositionOf = (verdict: Verdict, decision: { kind: DecisionKind } | undefined): Disposition =>
  isFlagged(verdict) ? (decision?.kind ?? "waiting") : "released";

const sensorId = z.string().min(1).max(100);

/** The body of a decision; `expiresOn` is the last day of a concession on the site's calendar. */
export const decisionInput = z.discriminatedUnion("kind", [
  z.strictObject({
    sensorId,
    kind: z.literal("concession"),
    reason: requiredText("The reason", "Say why the position may be used although it does not conform."),
    expiresOn: z.iso.date("Write the date as year-month-day.").nullish(),
  }),
  z.strictObject({
    sensorId,
    kind: z.literal("held"),
    reason: requiredText("The reason", "Say what has to be verified on site."),
  }),
  z.strictObject({
    sensorId,
    kind: z.literal("not-released"),
    reason: requiredText("The reason", "Say why the position is not released."),
    moveTo: plainText("The suggestion", 1000).default(""),
  }),
]);

export type DecisionInput = z.output<typeof decisionInput>;

/** Days before a concession's end on which planner and auditor are told, the nearest last. */
export const reminderDays = [30, 7] as const;

const dayMs = 24 * 60 * 60_000;

/** The day of `at` on a calendar of the time zone, such as 2026-12-01. */
export function calendarDay(at: Date, timeZone: string): string {
  const parts = new Intl.DateTimeFormat("en-CA", {
    timeZone,
    year: "numeric",
    month: "2-digit",
    day: "2-digit",
  }).formatToParts(at);
  const part = (type: string) => parts.find((one) => one.type === type)?.value ?? "";
  return `${part("year")}-${part("month")}-${part("day")}`;
}

/** Days from one calendar day to another; negative when `to` is past. */
export const daysBetween = (from: string, to: string): number =>
  Math.round((Date.parse(`${to}T00:00:00Z`) - Date.parse(`${from}T00:00:00Z`)) / dayMs);

/** A concession holds through its last day. */
export const concessionHasEnded = (expiresOn: string, today: string): boolean =>
  daysBetween(today, expiresOn) < 0;

/**
 * Of which reminder it is time, in days before the end. One whose day had passed when the concession was granted is
 * left out: whoever granted it knew.
 */
export function reminderDue(expiresOn: string, grantedOn: string, today: string): number | null {
  const left = daysBetween(today, expiresOn);
  const due = reminderDays.filter((days) => left <= days && daysBetween(grantedOn, expiresOn) > days);
  return left < 0 || due.length === 0 ? null : Math.min(...due);
}
