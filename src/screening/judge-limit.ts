import { limitValue } from "~/domain/plan-document/sensor";
import { VERDICTS, type Finding } from "~/domain/screening-result";
import { contributionsOf } from "./contributions";
import { fieldReport } from "./field-report";
import type { LimitJudging } from "./judging";
import { distinctCases, largestSwing, type CaseFactors } from "./load-cases";
import type { Measured, MeasuredState } from "./measures/measure";
import type { Uncertainty, UncertaintyOf } from "./uncertainty/uncertainty";
import { cappedVerdict, guardedVerdict } from "./verdict";

interface Candidate {
  factors: CaseFactors;
  state: MeasuredState;
  measured: Measured;
  uncertainty: Uncertainty;
  verdict: Finding["verdict"];
}

/** Judges a limit in every load case; the greatest (verdict, value + U) governs, the first on a tie. */
export function judgeLimit(judging: LimitJudging, capped: boolean, uncertaintyOf: UncertaintyOf): Finding {
  const { limit } = judging;
  const bound = limitValue(limit);
  const candidates = casesOf(judging).map((factors): Candidate => {
    const { state, measured } = judging.measureIn(factors);
    const uncertainty = uncertaintyOf(judging, factors, state, measured);
    const verdict = guardedVerdict(measured.value, uncertainty.expanded, bound);
    return { factors, state, measured, uncertainty, verdict: cappedVerdict(verdict, capped) };
  });
  const { factors, measured, uncertainty, verdict } = candidates.reduce(worse);
  return {
    limitId: limit.id,
    kind: limit.kind,
    limit: bound,
    value: measured.value,
    expandedUncertainty: uncertainty.expanded,
    uncertaintyMethod: uncertainty.method,
    unit: judging.measure.unit,
    budgetUsed: measured.value / bound,
    verdict,
    loadCaseId: factors.id,
    ...fieldReport(judging, factors),
    contributions: contributionsOf(judging, factors, measured),
  };
}

/**
 * Load cases, those left out that do to this limit what an earlier one does (the first listed governs on a tie); for swing the one pair
 * whose difference is the largest.
 */
function casesOf(judging: LimitJudging): CaseFactors[] {
  const { plan } = judging.at;
  if (judging.limit.kind !== "swing") return distinctCases(plan, judging.measure.includes);
  const groupsIn = (factors: CaseFactors) => judging.stateIn(factors).groups;
  const valueOf = (groups: Float64Array, factors: CaseFactors) =>
    judging.measure.value({ groups, bounds: judging.boundsIn(factors), earth: null });
  return [largestSwing(plan, groupsIn, valueOf)];
}

function worse(one: Candidate, other: Candidate): Candidate {
  const rank = VERDICTS.indexOf(other.verdict) - VERDICTS.indexOf(one.verdict);
  if (rank !== 0) return rank > 0 ? other : one;
  const reach = ({ measured, uncertainty }: Candidate) => measured.value + uncertainty.expanded;
  return reach(other) > reach(one) ? other : one;
}
