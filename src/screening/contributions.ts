import type { Contribution } from "~/domain/screening-result";
import type { LimitJudging } from "./judging";
import type { CaseFactors } from "./load-cases";
import { product, type Measured } from "./measures/measure";

/**
 * Shares of the value by circuit, equipment and background in the document's order; only what takes part in the quantity is
 * listed. They sum to 1; all are 0 where the value is 0; range has none.
 */
export function contributionsOf(
  judging: LimitJudging,
  factors: CaseFactors,
  measured: Measured,
): Contribution[] {
  if (judging.limit.kind === "range") return [];
  const { plan } = judging.at;
  const parts = new Map<string, number>();
  plan.components.forEach(({ item, group }, index) => {
    if (!judging.included[index]) return;
    const id = plan.items[item]?.id ?? "";
    const { stride } = judging;
    const part = product(judging.phasors, stride * index, measured.share, stride * group, stride);
    parts.set(id, (parts.get(id) ?? 0) + (factors.items[item] as number) * part);
  });
  plan.bounds.forEach(({ id, frequencyHz }, index) => {
    if (!judging.measure.includes(frequencyHz)) return;
    const share = measured.boundShare[judging.boundClasses[index] as number] as number;
    parts.set(id, (judging.itemBounds[index] as number) * (factors.bounds[index] as number) * share);
  });
  const background = backgroundPart(judging, measured);
  return [
    ...[...parts].map(([id, part]) => ({ id, part })),
    ...(background === null ? [] : [{ id: "background", part: background }]),
  ];
}

function backgroundPart({ at, background, limit }: LimitJudging, measured: Measured): number | null {
  if (!at.sensor.background || limit.kind === "swing" || limit.kind === "gradient") return null;
  const steady = product(measured.share, 0, background.staticT, 0, 3);
  return background.bounds.reduce(
    (sum, bound, i) => sum + bound * (measured.boundShare[i] as number),
    steady,
  );
}
