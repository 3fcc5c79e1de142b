/** What one source spends: `part` as in a finding's contributions, below 0 where it relieves. */
export interface BudgetPart {
  id: string;
  /** The source's number on the drawing and in tables. */
  key: string;
  name: string;
  part: number;
}

export interface BudgetBarInput {
  /** Value over limit. */
  budgetUsed: number;
  /** Expanded uncertainty over limit. */
  uncertaintyShare: number;
  parts: readonly BudgetPart[];
}

export interface Span {
  /** Percent of the bar's width. */
  from: number;
  width: number;
}

export interface BudgetBarGeometry {
  segments: (BudgetPart & Span & { relieves: boolean })[];
  /** Where the budget is free, where it is full, and where the value stands. */
  zero: number;
  full: number;
  value: number;
  /** The guard band around 100 %: a value inside it is undecided. */
  guard: Span;
  /** Whole budgets beyond the first, for scale. */
  ticks: { at: number; budget: number }[];
}

const tickSteps = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 10_000, 100_000, 1_000_000];

/**
 * Lays out a stacked bar: spending to the right of zero in order of size, relief to the left, so that right minus left is
 * the value. The scale holds the greatest of a quarter over the budget, the stack, and the guard band.
 */
export function budgetBarGeometry({
  budgetUsed,
  uncertaintyShare,
  parts,
}: BudgetBarInput): BudgetBarGeometry {
  const spends = parts.filter(({ part }) => part > 0).sort((a, b) => b.part - a.part);
  const relieves = parts.filter(({ part }) => part < 0).sort((a, b) => a.part - b.part);
  const sum = (list: readonly BudgetPart[]) =>
    list.reduce((total, { part }) => total + Math.abs(part) * budgetUsed, 0);

  const left = sum(relieves);
  const right = 1.04 * Math.max(1.2, budgetUsed, sum(spends), 1 + Math.min(uncertaintyShare, 1));
  const scale = 100 / (left + right);
  const at = (budget: number) => (left + budget) * scale;

  let edge = at(0);
  const segments: BudgetBarGeometry["segments"] = [];
  for (const part of spends) {
    const width = part.part * budgetUsed * scale;
    segments.push({ ...part, from: edge, width, relieves: false });
    edge += width;
  }
  edge = at(0);
  for (const part of relieves) {
    const width = -part.part * budgetUsed * scale;
    edge -= width;
    segments.push({ ...part, from: edge, width, relieves: true });
  }

  const guardFrom = Math.max(0, 1 - uncertaintyShare);
  const guardTo = Math.min(right, 1 + uncertaintyShare);
  const step = tickSteps.find((candidate) => right / candidate <= 6) ?? right;
  const ticks: BudgetBarGeometry["ticks"] = [];
  for (let budget = Math.max(2, step); budget < right; budget += step) ticks.push({ at: at(budget), budget });

  return {
    segments,
    zero: at(0),
    full: at(1),
    value: at(budgetUsed),
    guard: { from: at(guardFrom), width: (guardTo - guardFrom) * scale },
    ticks,
  };
}
