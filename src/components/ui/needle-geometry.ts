/** 45° at a full budget, straight up while it is free, never quite flat however far it is overspent. */
export function needleAngleDeg(budgetUsed: number): number {
  return Math.min(80, Math.max(0, budgetUsed) * 45);
}
