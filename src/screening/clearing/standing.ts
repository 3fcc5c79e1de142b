import type { Standing } from "~/domain/clearing";
import type { SensorResult } from "~/domain/screening-result";

/** How much of its budget a sensor spends, uncertainty included: the largest (value + U) / limit of its findings. */
export function reachOfResult({ findings }: SensorResult): number {
  return findings.reduce(
    (most, { value, expandedUncertainty, limit }) => Math.max(most, (value + expandedUncertainty) / limit),
    0,
  );
}

export function standingOf(result: SensorResult): Standing {
  const budgetUsed = result.findings.reduce((most, finding) => Math.max(most, finding.budgetUsed), 0);
  return { verdict: result.verdict, budgetUsed, reach: reachOfResult(result) };
}
