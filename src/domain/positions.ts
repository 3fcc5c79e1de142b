import type { LoadCase, PlanDocument } from "./plan-document/plan-document";
import type { Limit, Sensor } from "./plan-document/sensor";
import { type Finding, type ScreeningResult, type Verdict, VERDICTS } from "./screening-result";

/** A sensor with what the engine found, its worst finding first. */
export interface Position {
  sensor: Sensor;
  verdict: Verdict;
  findings: readonly (Finding & { measured: string })[];
  /** The finding that makes the verdict. */
  governing: (Finding & { measured: string }) | undefined;
}

const worstFirst = (
  a: { verdict: Verdict; budgetUsed: number },
  b: { verdict: Verdict; budgetUsed: number },
) => VERDICTS.indexOf(b.verdict) - VERDICTS.indexOf(a.verdict) || b.budgetUsed - a.budgetUsed;

/** The result's sensors with their places in the plan, worst first, by name where they are alike. */
export function positionsWorstFirst(document: PlanDocument, result: ScreeningResult): Position[] {
  const sensors = new Map(document.sensors.map((sensor) => [sensor.id, sensor]));
  const positions = result.sensors.flatMap(({ id, verdict, findings }): Position[] => {
    const sensor = sensors.get(id);
    if (sensor === undefined) return [];
    const limits = new Map(sensor.limits.map((limit) => [limit.id, limit]));
    const measured = findings
      .map((finding) => ({ ...finding, measured: quantityMeasured(finding, limits.get(finding.limitId)) }))
      .sort(worstFirst);
    return [{ sensor, verdict, findings: measured, governing: measured[0] }];
  });
  const rank = ({ verdict, governing }: Position) => ({ verdict, budgetUsed: governing?.budgetUsed ?? 0 });
  return positions.sort(
    (a, b) =>
      worstFirst(rank(a), rank(b)) || a.sensor.name.localeCompare(b.sensor.name, "en", { numeric: true }),
  );
}

/** What a limit compares, in words: "Alternating (AC), 10 to 1000 Hz, rms". */
export function quantityMeasured(finding: Pick<Finding, "kind">, limit: Limit | undefined): string {
  switch (finding.kind) {
    case "static":
      return "Static (DC)";
    case "alternating": {
      if (limit?.kind !== "alternating") return "Alternating (AC)";
      const [lowHz, highHz] = limit.bandHz;
      const measure = limit.measure === "rms" ? "rms" : "peak to peak";
      return `Alternating (AC), ${String(lowHz)} to ${String(highHz)}\u00a0Hz, ${measure}`;
    }
    case "swing":
      return "Swing between load cases (DC)";
    case "heading":
      return "Heading error";
    case "gradient":
      return "Gradient (DC)";
    case "range":
      return "Range, with the Earth’s field";
  }
}

/** The load case's own name; null where the document has none or the finding names none. */
export function loadCaseName(loadCases: readonly LoadCase[], loadCaseId: string | null): string | null {
  if (loadCaseId === null) return null;
  const named = loadCases.find(({ id }) => id === loadCaseId);
  return named === undefined || named.name === "" ? loadCaseId : named.name;
}

export function countVerdicts(verdicts: readonly Verdict[]): Record<Verdict, number> {
  const counts: Record<Verdict, number> = { within: 0, undecided: 0, over: 0 };
  for (const verdict of verdicts) counts[verdict] += 1;
  return counts;
}
