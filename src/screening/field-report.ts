import type { Finding } from "~/domain/screening-result";
import type { LimitJudging } from "./judging";
import type { CaseFactors } from "./load-cases";
import { ellipseAt } from "./measures/ellipse";
import { sumGroups } from "./sensor-field";

type Triple = [number, number, number];

/**
 * Total field at the sensor in one load case, all frequencies, the Earth's field and backgrounds left out, and for limits
 * on alternating fields the ellipse over the frequencies that they judge. A swing is a difference of DC states: nothing alternates in it.
 */
export function fieldReport(judging: LimitJudging, factors: CaseFactors): Pick<Finding, "field" | "ellipse"> {
  const { plan, field } = judging.at;
  const { groups: table } = plan.frequencies;
  const groups = new Float64Array(6 * table.length);
  const everything = plan.components.map(() => true);
  sumGroups(plan, field.phasors, 6, factors.items, everything, groups);
  const triple = (at: number): Triple => [
    groups[at] as number,
    groups[at + 1] as number,
    groups[at + 2] as number,
  ];
  const alternating = table.flatMap(({ source, frequencyHz, classIndex }, index) =>
    classIndex === 0 || judging.limit.kind === "swing"
      ? []
      : [{ source, frequencyHz, re: triple(6 * index), im: triple(6 * index + 3) }],
  );
  return { field: { static: triple(0), alternating }, ellipse: ellipseOver(judging, factors) };
}

/** Over sources and frequencies: rms resultants root-sum-squared, major axes and peak-to-peak values added (upper bounds). */
function ellipseOver({ at: { plan, field }, included }: LimitJudging, factors: CaseFactors) {
  const { groups: table } = plan.frequencies;
  const groups = new Float64Array(6 * table.length);
  sumGroups(plan, field.phasors, 6, factors.items, included, groups);
  // A source's frequencies within 0.5 % are one group, of which a band may take a part.
  const judged = new Set(plan.components.flatMap(({ group }, i) => (included[i] ? [group] : [])));
  const ellipses = table.flatMap(({ classIndex }, index) =>
    classIndex > 0 && judged.has(index) ? [ellipseAt(groups, 6 * index)] : [],
  );
  if (ellipses.length === 0) return null;
  const majorAxisT = ellipses.reduce((sum, { major }) => sum + major, 0);
  return {
    rmsT: Math.sqrt(ellipses.reduce((sum, { rms }) => sum + rms * rms, 0)),
    majorAxisT,
    peakToPeakT: 2 * Math.SQRT2 * majorAxisT,
  };
}
