import { distance, distanceToLeg } from "~/field/vector";
import type { Sensor } from "~/domain/plan-document/sensor";
import type { CompiledPlan } from "../compile";
import { conductorDistanceM, reachOf } from "../checks/near-conductors";
import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import { product, type Measured, type MeasuredState } from "../measures/measure";
import type { SourceItem } from "../source-item";
import { inputVectors, traceBound, type InputVector } from "./input-vectors";

/** Position tolerances above this share of the distance to a conductor leave the first order. */
const NEAR_SHARE = 0.2;
/** Relative change at which the power iteration stops. */
const CONVERGED = 1e-6;
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
export function isResolved(
  judging: LimitJudging,
  factors: CaseFactors,
  state: MeasuredState,
  measured: Measured,
): boolean {
  const compared = comparedPart(judging, state);
  const least = product(compared, 0, compared, 0, compared.length) / RESOLVED ** 2;
  // The largest eigenvalue is at most the trace, and a bound of the trace is had for little.
  if (least >= traceBound(judging, factors)) return true;
  const inputs = inputVectors(judging, factors, measured.slope).map((input) =>
    comparedVector(judging, input),
  );
  const trace = inputs.reduce((sum, { values }) => sum + product(values, 0, values, 0, values.length), 0);
  return least >= trace || least >= largestEigenvalue(inputs, compared.length);
}

interface SparseVector {
  /** Where each run of `run` numbers of `values` stands in the whole. */
  starts: number[];
  run: number;
  values: Float64Array;
}

/** The part of the state that the limit compares: components along an axis, the horizontal part, or all of it. */
function comparedPart(judging: LimitJudging, { groups, earth }: MeasuredState): Float64Array {
  const { values } = comparedVector(judging, {
    groups: Array.from({ length: groups.length / judging.stride }, (_, group) => group),
    values: groups,
  });
  if (judging.limit.kind !== "range" || !earth) return values;
  return values.map((component, i) => component + (earth.fieldT[i] ?? 0));
}

function comparedVector(
  { measure, limit, stride }: LimitJudging,
  { groups, values }: Pick<InputVector, "groups" | "values">,
): SparseVector {
  // A range is judged by its steady part: the rest is added by magnitude and has no direction to lose.
  if (limit.kind === "range") return dcPart(groups, values, stride, 3);
  if (limit.kind === "heading") return dcPart(groups, values, stride, 2);
  const { axis } = measure;
  if (!axis && limit.kind !== "alternating") return dcPart(groups, values, stride, measure.width);
  if (!axis) return { starts: groups.map((group) => stride * group), run: stride, values };
  const projected = new Float64Array(values.length / 3);
  for (let i = 0; i < projected.length; i++) projected[i] = product(values, 3 * i, axis, 0, 3);
  return { starts: groups.map((group) => 2 * group), run: 2, values: projected };
}

function dcPart(groups: number[], values: Float64Array, stride: number, run: number): SparseVector {
  const dc = groups.indexOf(0);
  if (dc < 0) return { starts: [0], run, values: new Float64Array(run) };
  return { starts: [0], run, values: values.slice(stride * dc, stride * dc + run) };
}

/** Of Σ d dᵀ over the inputs' vectors, by power iteration. */
function largestEigenvalue(inputs: readonly SparseVector[], dimension: number): number {
  let vector = new Float64Array(dimension);
  for (const { starts, run, values } of inputs) {
    // A start that leans on every input: its size where each of them points.
    values.forEach((value, i) => {
      const at = (starts[Math.floor(i / run)] as number) + (i % run);
      vector[at] = (vector[at] as number) + Math.abs(value);
    });
  }
  let eigenvalue = 0;
  for (let iteration = 0; iteration < 40; iteration++) {
    const size = Math.sqrt(product(vector, 0, vector, 0, dimension));
    if (size === 0) return 0;
    const direction = vector.map((value) => value / size);
    if (Math.abs(size - eigenvalue) <= CONVERGED * size) return size;
    eigenvalue = iteration > 0 ? size : 0;
    vector = new Float64Array(dimension);
    for (const input of inputs) addProjection(vector, input, direction);
  }
  return eigenvalue;
}

/** into += d (d·direction). */
function addProjection(
  into: Float64Array,
  { starts, run, values }: SparseVector,
  direction: Float64Array,
): void {
  let along = 0;
  starts.forEach((start, block) => (along += product(values, run * block, direction, start, run)));
  starts.forEach((start, block) => {
    for (let i = 0; i < run; i++)
      into[start + i] = (into[start + i] as number) + along * (values[run * block + i] as number);
  });
}
