import type { Finding } from "~/domain/screening-result";
import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import type { Measured, MeasuredState } from "../measures/measure";
import { standardUncertainty } from "./first-order";

export interface Uncertainty {
  /** Expanded uncertainty in the limit's unit. */
  expanded: number;
  method: Finding["uncertaintyMethod"];
}

/** Coverage factor of first-order uncertainties. */
const COVERAGE = 2;

export function uncertaintyOf(
  judging: LimitJudging,
  factors: CaseFactors,
  state: MeasuredState,
  measured: Measured,
): Uncertainty {
  return {
    expanded: COVERAGE * standardUncertainty(judging, factors, state, measured),
    method: "first-order",
  };
}
