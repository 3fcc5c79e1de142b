import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import type { Measured, MeasuredState } from "../measures/measure";
import { effectsOf, RECTANGULAR, SENSOR_AXES } from "./families";
import { strayEffect } from "./stray";

/** Standard uncertainty of a measured value to first order (JCGM 100): root of the sum of the squared effects of all inputs. */
export function standardUncertainty(
  judging: LimitJudging,
  factors: CaseFactors,
  state: MeasuredState,
  measured: Measured,
): number {
  const { at, included, measure } = judging;
  let variance = boundToleranceVariance(judging, factors, measured);
  for (const family of at.familiesFor(measure.width)) {
    const effects = effectsOf(family, at.plan.components, factors.items, included, measured.slope);
    const axis = SENSOR_AXES.findIndex((name) => name === family.kind);
    // The sensor's own place moves the bounds as well.
    if (axis >= 0) effects[0] = (effects[0] as number) + boundDisplacement(judging, factors, measured, axis);
    for (const effect of effects) variance += effect * effect;
  }
  for (const stray of at.straysFor(measure.width)) {
    if (!included[stray.component]) continue;
    variance += ((factors.items[stray.item] as number) * strayEffect(stray, measured.slope)) ** 2;
  }
  variance += backgroundVariance(judging, measured);
  if (state.earth) {
    variance += (measured.byHorizontalT * state.earth.horizontalSigmaT) ** 2;
    variance += (measured.byDeclinationRad * state.earth.declinationSigmaRad) ** 2;
  }
  return Math.sqrt(variance);
}

function boundToleranceVariance(judging: LimitJudging, factors: CaseFactors, measured: Measured): number {
  return judging.at.plan.bounds.reduce((sum, bound, i) => {
    const size = (judging.itemBounds[i] as number) * (factors.bounds[i] as number);
    const slope = measured.boundSlope[judging.boundClasses[i] as number] as number;
    return sum + (slope * size * bound.tolerancePercent * 0.01 * RECTANGULAR) ** 2;
  }, 0);
}

/** A bound falls as r⁻³ (its gradient as r⁻⁴) along the line from the centre. */
function boundDisplacement(
  judging: LimitJudging,
  factors: CaseFactors,
  measured: Measured,
  axis: number,
): number {
  const { at, measure } = judging;
  const power = measure.width === 3 ? 3 : 4;
  return judging.itemBounds.reduce((sum, bound, i) => {
    const perMetre =
      (-power * bound * (at.bounds.outward[i]?.[axis] ?? 0)) / (at.bounds.distanceM[i] as number);
    const slope = measured.boundSlope[judging.boundClasses[i] as number] as number;
    return (
      sum + slope * perMetre * (factors.bounds[i] as number) * at.sensor.positionToleranceM * RECTANGULAR
    );
  }, 0);
}

/** A background's stated expanded uncertainty is two standard uncertainties of its magnitude. */
export function backgroundVariance({ at, background, limit }: LimitJudging, measured: Measured): number {
  const stated = at.sensor.background?.expandedUncertaintyT ?? 0;
  if (stated === 0 || limit.kind === "swing" || limit.kind === "gradient") return 0;
  const dc = background.staticT.some((component) => component !== 0)
    ? Math.hypot(measured.slope[0] as number, measured.slope[1] as number, measured.slope[2] as number)
    : 0;
  const slopes = background.bounds.map((bound, i) => (bound > 0 ? (measured.boundSlope[i] as number) : 0));
  return (stated / 2) ** 2 * slopes.reduce((sum, slope) => sum + slope * slope, dc * dc);
}
