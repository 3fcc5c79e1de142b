import type { Verdict } from "~/domain/screening-result";

/** A plan as lists show it. */
export interface PlanLine {
  id: string;
  name: string;
  /** Null where the plan has never been screened. */
  verdict: Verdict | null;
  flaggedCount: number;
  screeningId: string | null;
  screenedAt: Date | null;
  lastSavedAt: Date;
  changedSinceScreening: boolean;
}

/** Lists know the verdict but not the budget: the needle stands for the verdict alone. */
export const needleOf = (verdict: Verdict | null): number =>
  verdict === "over" ? 1.4 : verdict === "undecided" ? 1 : 0.2;

/** What waits for somebody: flagged positions first, then plans that changed after they were screened or never were. */
export function waitingPlans<T extends PlanLine>(plans: readonly T[]): (T & { why: string })[] {
  const rank = { over: 0, undecided: 1 };
  const flagged = plans
    .filter(({ verdict }) => verdict === "over" || verdict === "undecided")
    .sort((a, b) => rank[a.verdict as keyof typeof rank] - rank[b.verdict as keyof typeof rank])
    .map((plan) => ({ ...plan, why: flaggedWords(plan) }));
  const unscreened = plans
    .filter(({ verdict }) => verdict === null)
    .map((plan) => ({ ...plan, why: "not screened yet" }));
  const changed = plans
    .filter(({ verdict, changedSinceScreening }) => verdict === "within" && changedSinceScreening)
    .map((plan) => ({ ...plan, why: "changed since its screening" }));
  return [...flagged, ...changed, ...unscreened];
}

function flaggedWords({ flaggedCount, changedSinceScreening }: PlanLine): string {
  const positions = flaggedCount === 1 ? "1 flagged position" : `${String(flaggedCount)} flagged positions`;
  return changedSinceScreening ? `${positions}, changed since its screening` : positions;
}
