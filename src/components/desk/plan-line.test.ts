import { describe, expect, it } from "vitest";
import { type PlanLine, waitingPlans } from "./plan-line";

const line = (name: string, part: Partial<PlanLine>): PlanLine => ({
  id: name,
  name,
  verdict: null,
  flaggedCount: 0,
  screeningId: null,
  screenedAt: null,
  lastSavedAt: new Date(0),
  changedSinceScreening: false,
  ...part,
});

describe("waitingPlans", () => {
  it("puts over before undecided before changed before never screened, and leaves settled plans out", () => {
    const waiting = waitingPlans([
      line("new", {}),
      line("settled", { verdict: "within" }),
      line("changed", { verdict: "within", changedSinceScreening: true }),
      line("undecided", { verdict: "undecided", flaggedCount: 2 }),
      line("over", { verdict: "over", flaggedCount: 1, changedSinceScreening: true }),
    ]);
    expect(waiting.map(({ name, why }) => `${name}: ${why}`)).toEqual([
      "over: 1 flagged position, changed since its screening",
      "undecided: 2 flagged positions",
      "changed: changed since its screening",
      "new: not screened yet",
    ]);
  });
});
