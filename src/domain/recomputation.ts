import type { ScreeningResult, Verdict } from "./screening-result";

export interface ChangedVerdict {
  sensorId: string;
  /** Null where that result does not have the sensor. */
  before: Verdict | null;
  after: Verdict | null;
}

/** Sensors whose verdict is not the same in both results, in the order of the first; those that only one has among them. */
export function changedVerdicts(before: ScreeningResult, after: ScreeningResult): ChangedVerdict[] {
  const verdictsOf = ({ sensors }: ScreeningResult) =>
    new Map(sensors.map(({ id, verdict }) => [id, verdict]));
  const then = verdictsOf(before);
  const now = verdictsOf(after);
  return [...new Set([...then.keys(), ...now.keys()])].flatMap((sensorId) => {
    const change = { sensorId, before: then.get(sensorId) ?? null, after: now.get(sensorId) ?? null };
    return change.before === change.after ? [] : [change];
  });
}

const relative = (a: number, b: number): number =>
  a === b ? 0 : Math.abs(a - b) / Math.max(Math.abs(a), Math.abs(b));

/**
 * The largest relative difference of any value or expanded uncertainty: |a − b| / max(|a|, |b|).
 * Null where one result has a finding that the other lacks, so that no number would tell the whole.
 */
export function largestDifference(a: ScreeningResult, b: ScreeningResult): number | null {
  const findingsOf = ({ sensors }: ScreeningResult) =>
    new Map(
      sensors.flatMap(({ id, findings }) =>
        findings.map((finding) => [JSON.stringify([id, finding.limitId]), finding] as const),
      ),
    );
  const ours = findingsOf(a);
  const theirs = findingsOf(b);
  if (ours.size !== theirs.size) return null;
  let largest = 0;
  for (const [key, finding] of ours) {
    const other = theirs.get(key);
    if (other === undefined) return null;
    largest = Math.max(
      largest,
      relative(finding.value, other.value),
      relative(finding.expandedUncertainty, other.expandedUncertainty),
    );
  }
  return largest;
}
