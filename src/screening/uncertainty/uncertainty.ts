import type { Finding } from "~/domain/screening-result";
import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import type { Measured, MeasuredState } from "../measures/measure";
import { standardUncertainty } from "./first-order";
import { isResolved, nearBounds, nearItems } from "./linearity";
import { DRAWS, monteCarloUncertainty } from "./monte-carlo";
import { NearItems } from "./near-items";
import { randomStream } from "./random";

export interface Uncertainty {
  /** Expanded uncertainty in the limit's unit. */
  expanded: number;
  method: Finding["uncertaintyMethod"];
}

export type UncertaintyOf = (
  judging: LimitJudging,
  factors: CaseFactors,
  state: MeasuredState,
  measured: Measured,
) => Uncertainty;

/** Streams of places count down from here, those of everything else up from nought. */
const PLACES_STREAM = -1;
/** Coverage factor of first-order uncertainties. */
const COVERAGE = 2;

/**
 * Uncertainties of one sensor's limits: to first order where that is safe, by Monte Carlo where a position tolerance is above a fifth
 * of the distance to a conductor, or where the field compared is not clear of its own spread. Seeded by `seedHash` and the number of the sensor.
 */
export function uncertaintiesOf(seedHash: string, sensorIndex: number): UncertaintyOf {
  const seed = seedHash.replace("sha256:", "");
  const anew = new Map<3 | 9, NearItems>();
  return (judging, factors, state, measured) => {
    const { plan, sensor } = judging.at;
    const near = judging.at.nearItems(() => nearItems(plan, sensor));
    const safe =
      near.length === 0 && !nearBounds(plan, sensor) && isResolved(judging, factors, state, measured);
    if (safe) {
      return {
        expanded: COVERAGE * standardUncertainty(judging, factors, state, measured),
        method: "first-order",
      };
    }
    const { width } = judging.measure;
    if (near.length > 0 && !anew.has(width)) {
      const random = randomStream(seed, PLACES_STREAM - sensorIndex);
      anew.set(width, new NearItems(plan, sensor, width, judging.at.familiesFor(width), near, DRAWS, random));
    }
    const redrawn = anew.get(width) ?? null;
    const random = randomStream(seed, sensorIndex);
    const expanded = monteCarloUncertainty(judging, factors, measured, near, redrawn, random);
    return { expanded, method: "monte-carlo" };
  };
}
