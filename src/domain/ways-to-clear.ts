import { formatQuantity, quantityText } from "./format";
import type { PlanDocument } from "./plan-document/plan-document";
import type { Sensor } from "./plan-document/sensor";
import type { Finding, ScreeningResult } from "./screening-result";
import { sourceFinder, numberedSources } from "./sources";
import { radians } from "./units";
import { waitingCircuits } from "./waiting-circuits";

export interface Judged {
  document: PlanDocument;
  result: Pick<ScreeningResult, "earthField">;
  sensor: Sensor;
  finding: Finding;
}

/**
 * What would bring a finding within its limit, in sentences. Only what follows from the result itself: other places,
 * spacings and arrangements need a screening of their own.
 */
export function waysToClear(judged: Judged): string[] {
  const { finding } = judged;
  if (finding.verdict === "within") return [];
  return [...waysToLessField(judged), ...waysToCertainty(judged)];
}

function waysToLessField(judged: Judged): string[] {
  const { finding, document } = judged;
  if (finding.value + finding.expandedUncertainty <= finding.limit) return [];
  const share = shareOfAllSources(judged);
  const sentences: string[] = [];
  const inCase =
    finding.loadCaseId !== null && document.loadCases.length > 1 ? " in the load case that governs" : "";
  if (share !== null && share >= 0.01)
    sentences.push(
      `All sources drawn, taken down together to ${wholePercent(Math.floor(share * 100))} of what is stated, would bring it within its limit${inCase}.`,
    );
  if (finding.expandedUncertainty >= finding.limit)
    sentences.push("Its uncertainty alone fills the budget: know currents and positions better first.");
  const largest = largestSpender(finding);
  if (largest === null || finding.value <= finding.limit) return sentences;
  const { name } = sourceFinder(numberedSources(document))(largest.id);
  const spenderShare = shareOfSpender(judged, largest.part);
  if (spenderShare === null) return sentences;
  sentences.push(
    spenderShare < 0
      ? `Less of ${name} alone, the largest spender, does not clear it.`
      : `Less of ${name} alone, the largest spender: it would have to come down at least to ${wholePercent(Math.ceil(spenderShare * 100))} of what is stated; screen again to confirm.`,
  );
  return sentences;
}

function waysToCertainty({ finding, document }: Judged): string[] {
  const { value, limit, expandedUncertainty, unit, verdict } = finding;
  if (verdict !== "undecided") return [];
  if (value + expandedUncertainty <= limit)
    return waitingCircuits(document).length > 0
      ? ["What is drawn fits its budget: trace the circuits that wait and state their currents to decide it."]
      : [
          "What is drawn fits its budget, but the warnings name a place where the model claims no accuracy: measure on site.",
        ];
  const room = limit - value;
  return [
    room > 0
      ? `As it stands it would be within if its uncertainty were at most ${quantityText(formatQuantity(room, unit))}: know currents and positions better, or measure on site.`
      : "Knowing currents and positions better, or measuring on site, would tell whether it is over.",
  ];
}

/**
 * The share of all currents at which the value and its present uncertainty just fit the limit; U never grows when
 * currents shrink, so this is on the safe side. Null where the value does not follow the currents alone.
 */
export function shareOfAllSources({ finding, sensor, document, result }: Judged): number | null {
  const { kind, value, limit, expandedUncertainty } = finding;
  const roomForValue = limit - expandedUncertainty;
  if (kind === "range" || value <= 0 || roomForValue <= 0) return null;
  if (sensor.background !== null || finding.contributions.some(({ id }) => id === "background")) return null;
  if (kind === "heading") return headingShare(finding, roomForValue, document, result);
  return roomForValue / value;
}

/** Solves |atan2(s b⊥, H + s b∥)| = room for s (field model §7); null where the value is not that angle alone. */
function headingShare(
  finding: Finding,
  roomDeg: number,
  document: PlanDocument,
  result: Judged["result"],
): number | null {
  const { earthField } = result;
  if (earthField === null || roomDeg >= 90) return null;
  const [eastward, northward] = finding.field.static;
  const turnRad = radians(earthField.declinationDeg - document.frame.northBearingDeg);
  const alongT = eastward * Math.sin(turnRad) + northward * Math.cos(turnRad);
  const acrossT = Math.abs(eastward * Math.cos(turnRad) - northward * Math.sin(turnRad));
  const angleRad = Math.atan2(acrossT, earthField.horizontalT + alongT);
  if (Math.abs(angleRad - radians(finding.value)) > 1e-6 * angleRad) return null;
  const slope = Math.tan(radians(roomDeg));
  const steepness = acrossT - slope * alongT;
  return steepness > 0 ? (slope * earthField.horizontalT) / steepness : null;
}

function largestSpender(finding: Finding) {
  const [largest] = [...finding.contributions].sort((a, b) => b.part - a.part);
  return largest !== undefined && largest.part > 0 && largest.id !== "background" ? largest : null;
}

/**
 * What at most may be left of one spender. The value is a convex function of its current and the contribution is the
 * slope, so the value never falls below that line: the share is a necessary one. Below 0: not even without it.
 * Null for kinds whose contributions are no such slope.
 */
export function shareOfSpender({ finding, sensor }: Judged, part: number): number | null {
  const limitOfSensor = sensor.limits.find(({ id }) => id === finding.limitId);
  const isSlope =
    finding.kind === "static" ||
    finding.kind === "swing" ||
    finding.kind === "gradient" ||
    (finding.kind === "alternating" &&
      limitOfSensor?.kind === "alternating" &&
      limitOfSensor.measure === "rms");
  return isSlope ? 1 - (1 - finding.limit / finding.value) / part : null;
}

const wholePercent = (percent: number): string => `${String(percent)}\u00a0%`;
