import { degrees } from "~/domain/units";
import { blankMeasured, type Measure } from "./measure";

const FLOOR_T = 1e-18;

/**
 * Compass deviation |δ| in degrees, δ = atan2(b⊥, H + b∥) of the horizontal DC disturbance; a bound b (T) adds asin(b/R₀)
 * with R₀ the disturbed horizontal field, 180° where b ≥ R₀. Throws without an Earth field.
 */
export const headingMeasure: Measure = (state) => {
  const { earth, groups } = state;
  if (!earth) throw new Error("a heading is judged against the Earth's field, and none was given");
  const measured = blankMeasured(state);
  const { northward, eastward, elements } = earth;
  const x = groups[0] as number;
  const y = groups[1] as number;
  const alongNorth = x * northward[0] + y * northward[1];
  const towardEast = x * eastward[0] + y * eastward[1];
  const north = elements.horizontalT + alongNorth;
  // A field that cancels the Earth's to nothing turns the needle anywhere; a floor far below any field keeps the slopes finite.
  const squared = Math.max(north * north + towardEast * towardEast, FLOOR_T ** 2);
  const r0 = Math.sqrt(squared);
  const deviation = Math.atan2(towardEast, north);
  const sign = deviation < 0 ? -1 : 1;
  const bound = state.bounds[0] ?? 0;
  const boundRad = bound >= r0 ? Math.PI : Math.asin(bound / r0);
  const free = bound < r0 ? 1 / Math.sqrt(1 - (bound / r0) ** 2) : 0;

  const valueRad = Math.min(Math.PI, Math.abs(deviation) + boundRad);
  measured.value = degrees(valueRad);
  // d|δ| = ±(N dE − E dN)/R₀²; d asin(b/R₀) = (db − b dR₀/R₀)/(R₀ √(1 − b²/R₀²)).
  const byNorth = degrees((-sign * towardEast) / squared - (free * bound * north) / (squared * r0));
  const byEast = degrees((sign * north) / squared - (free * bound * towardEast) / (squared * r0));
  measured.slope[0] = byNorth * northward[0] + byEast * eastward[0];
  measured.slope[1] = byNorth * northward[1] + byEast * eastward[1];
  measured.boundSlope[0] = degrees(free / r0);
  measured.byHorizontalT = byNorth;
  measured.byDeclinationRad = byNorth * towardEast - byEast * alongNorth;

  const horizontal2 = x * x + y * y;
  if (valueRad === 0) return measured;
  const boundPart = Math.min(valueRad, boundRad) / valueRad;
  if (horizontal2 > 0) {
    measured.share[0] = ((1 - boundPart) * x) / horizontal2;
    measured.share[1] = ((1 - boundPart) * y) / horizontal2;
  }
  measured.boundShare[0] = bound > 0 ? boundPart / bound : 0;
  return measured;
};
