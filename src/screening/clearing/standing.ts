import type { Standing } from "~/domain/clearing";
import type { Finding, SensorResult } from "~/domain/screening-result";

/** How much of its budget a sensor spends, uncertainty included: the largest (value + U) / limit of its findings. */
export function reachOfResult({ findings }: SensorResult): number {
  return findings.reduce((most, finding) => Math.max(most, reachOf(finding)), 0);
}

const reachOf = ({ value, expandedUncertainty, limit }: Finding): number =>
  (value + expandedUncertainty) / limit;

/** Fall of (value + U) / limit from one result of a sensor to another, summed over the limits that are flagged in the first. */
export function reachGained(before: SensorResult, after: SensorResult): number {
  return before.findings.reduce((sum, finding, index) => {
    const next = after.findings[index];
    if (finding.verdict === "within" || !next) return sum;
    return sum + reachOf(finding) - reachOf(next);
  }, 0);
}

export function standingOf(result: SensorResult): Standing {
  const budgetUsed = result.findings.reduce((most, finding) => Math.max(most, finding.budgetUsed), 0);
  return { verdict: result.verdict, budgetUsed, reach: reachOfResult(result) };
}
