import type { Verdict } from "~/domain/screening-result";

/** Guarded acceptance (JCGM 106; ILAC-G8): within when value + U ≤ limit, over when value − U > limit, otherwise undecided. */
export function guardedVerdict(value: number, expandedUncertainty: number, limit: number): Verdict {
  if (value + expandedUncertainty <= limit) return "within";
  return value - expandedUncertainty > limit ? "over" : "undecided";
}

/** The verdict of something of which not all is known: no better than undecided. */
export function cappedVerdict(verdict: Verdict, capped: boolean): Verdict {
  return capped && verdict === "within" ? "undecided" : verdict;
}
