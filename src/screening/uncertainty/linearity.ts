import { distance, distanceToLeg } from "~/field/vector";
import type { Sensor } from "~/domain/plan-document/sensor";
import type { CompiledPlan } from "../compile";
import { conductorDistanceM, reachOf } from "../checks/near-conductors";
import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import { product, type MeasuredState } from "../measures/measure";
import type { SourceItem } from "../source-item";
import { inputVectors, type InputVector } from "./input-vectors";

/** Position tolerances above this share of the distance to a conductor leave the first order. */
const NEAR_SHARE = 0.2;
/** A field below so many standard deviations of itself has no direction to rely on. */
const RESOLVED = 3;

/** Items so near, for the position tolerances that matter, that their field does not change linearly over them. */
export function nearItems(plan: CompiledPlan, sensor: Sensor): number[] {
  return plan.items.flatMap((item, index) => {
    const own = item.kind === "circuit" ? item.circuit.positionToleranceM : 0;
    const toleranceM = Math.max(own, sensor.positionToleranceM);
    return toleranceM > 0 && isNearer(item, sensor, toleranceM / NEAR_SHARE) ? [index] : [];
  });
}

/** Whether a bounded dipole lies so near that the sensor's own tolerance changes its bound by more than first order tells. */
export function nearBounds(plan: CompiledPlan, sensor: Sensor): boolean {
  const reachM = sensor.positionToleranceM / NEAR_SHARE;
  return plan.bounds.some(({ centre }) => distance(centre, sensor.position) < reachM);
}

function isNearer(item: SourceItem, { position }: Sensor, withinM: number): boolean {
  if (item.kind === "equipment") {
    const { equipment } = item;
    const outerM = equipment.kind === "coil" ? Math.hypot(equipment.radiusM, equipment.lengthM / 2) : 0;
    const ringM = equipment.kind === "toroid" ? equipment.meanRadiusM + equipment.minorRadiusM : outerM;
    return distance(equipment.centre, position) - ringM < withinM;
  }
  const lookM = withinM + reachOf(item);
  if (!item.legs.some(({ start, end }) => distanceToLeg(start, end, position) < lookM)) return false;
  return conductorDistanceM(item, position) < withinM;
}

/**
 * Whether what is compared is at least three times the square root of the largest eigenvalue of its covariance, so that its
 * direction, and with it the first order, can be relied on.
 */
export function isResolved(judging: LimitJudging, factors: CaseFactors, state: MeasuredState): boolean {
  const compared = comparedPart(judging, state);
  const inputs = inputVectors(judging, factors).map((input) => comparedVector(judging, input));
  const squared = product(compared, 0, compared, 0, compared.length);
  const trace = inputs.reduce((sum, input) => sum + product(input, 0, input, 0, input.length), 0);
  // The largest eigenvalue is at most the trace, which is had for little.
  if (squared >= RESOLVED ** 2 * trace) return true;
  return squared >= RESOLVED ** 2 * largestEigenvalue(inputs, compared.length);
}

/** The part of the state that the limit compares: components along an axis, the horizontal part, or all of it. */
function comparedPart(judging: LimitJudging, state: MeasuredState): Float64Array {
  const part = comparedVector(judging, { groups: state.groups });
  if (judging.limit.kind === "range" && state.earth) {
    state.earth.fieldT.forEach((component, i) => (part[i] = (part[i] as number) + component));
  }
  return part;
}

function comparedVector(
  { measure, limit }: LimitJudging,
  { groups }: Pick<InputVector, "groups">,
): Float64Array {
  const { axis } = measure;
  // A range is judged by its steady part: the rest is added by magnitude and has no direction to lose.
  if (limit.kind === "range") return groups.slice(0, 3);
  if (limit.kind === "heading") return groups.slice(0, 2);
  if (!axis) return groups;
  const projected = new Float64Array(groups.length / 3);
  for (let i = 0; i < projected.length; i++) projected[i] = product(groups, 3 * i, axis, 0, 3);
  return projected;
}

/** Of Σ d dᵀ over the inputs' vectors, by power iteration. */
function largestEigenvalue(inputs: readonly Float64Array[], dimension: number): number {
  let vector = new Float64Array(dimension);
  const [heaviest] = [...inputs].sort(
    (a, b) => product(b, 0, b, 0, dimension) - product(a, 0, a, 0, dimension),
  );
  if (!heaviest) return 0;
  vector.set(heaviest);
  let eigenvalue = 0;
  for (let iteration = 0; iteration < 30; iteration++) {
    const next = new Float64Array(dimension);
    for (const input of inputs) {
      const along = product(input, 0, vector, 0, dimension);
      for (let i = 0; i < dimension; i++) next[i] = (next[i] as number) + along * (input[i] as number);
    }
    const size = Math.sqrt(product(next, 0, next, 0, dimension));
    if (size === 0) return 0;
    eigenvalue = size;
    vector = next.map((value) => value / size);
  }
  return eigenvalue;
}
