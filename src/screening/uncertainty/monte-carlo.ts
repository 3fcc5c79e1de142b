import type { LimitJudging } from "../judging";
import type { CaseFactors } from "../load-cases";
import { product, type Measured, type MeasuredState } from "../measures/measure";
import type { PlanEarth } from "../earth";
import { sumGroups } from "../sensor-field";
import { RECTANGULAR, type FamilyKind } from "./families";
import { backgroundVariance } from "./first-order";
import { inputVectors, type InputVector } from "./input-vectors";
import { PackedInputs } from "./packed-inputs";
import { partLumped } from "./lumped-inputs";
import type { NearItems } from "./near-items";
import type { RandomStream } from "./random";

export const DRAWS = 5000;
/** Point of the distribution that value + U reaches. */
const QUANTILE = 0.975;
/** Inputs that together make less than this share of the variance are left out: their effect is far below that of the number of draws. */
const DROPPED_SHARE = 1e-3;

/**
 * Expanded uncertainty by Monte Carlo (JCGM 101): all inputs are drawn, items in `near` are computed anew where each draw puts them,
 * the rest moves linearly; value + U is the 97.5 % point of the values drawn.
 */
export function monteCarloUncertainty(
  judging: LimitJudging,
  factors: CaseFactors,
  measured: Measured,
  near: readonly number[],
  nearItems: NearItems | null,
  random: RandomStream,
): number {
  const { earth, sensor } = judging.at;
  const nearSet = new Set(near);
  const base = baseGroups(judging, factors, nearSet);
  const inputs = inputVectors(judging, factors, measured.slope, nearSet);
  const isNeeded = neededApart(judging, nearItems);
  const { single: drawn, lumped } = partLumped(droppingSmall(inputs, isNeeded), judging.stride, isNeeded);
  const shared = drawn.map(({ kind, key }) => nearItems?.drawsOf(kind, key));
  const draws = new Float64Array(drawn.length);
  const packed = new PackedInputs(drawn, judging.stride);
  const places = new Map(drawn.map(({ kind, key }, index) => [`${kind} ${key}`, index]));
  const drawOf = (kind: FamilyKind, key: number) => draws[places.get(`${kind} ${key}`) ?? -1] ?? 0;
  const currentPlaces = drawn.flatMap(({ kind, key }, index) =>
    kind === "current" ? [[key, index] as const] : [],
  );
  const currentIndex = new Map(currentPlaces);
  const currentDraw = (key: number) => draws[currentIndex.get(key) ?? -1] ?? 0;
  const backgroundSigma = Math.sqrt(backgroundVariance(judging, measured));
  const bounds = new BoundDraws(judging, factors);
  const values = new Float64Array(DRAWS);
  const groups = new Float64Array(base.length);

  for (let i = 0; i < DRAWS; i++) {
    groups.set(base);
    for (let input = 0; input < draws.length; input++)
      draws[input] = shared[input]?.[i] ?? random.rectangular();
    packed.addTo(groups, draws);
    lumped?.addTo(groups, random);
    nearItems?.addTo(groups, i, factors, judging.included, currentDraw);
    const state: MeasuredState = {
      groups,
      bounds: bounds.drawn(judging.background.bounds, sensor.positionToleranceM, drawOf, random),
      earth: earth && drawnEarth(earth, random),
    };
    values[i] = judging.measure.value(state) + (backgroundSigma > 0 ? backgroundSigma * random.normal() : 0);
  }
  values.sort();
  return Math.max(0, (values[Math.ceil(QUANTILE * DRAWS) - 1] as number) - measured.value);
}

/** Groups of everything that moves linearly, background included. */
function baseGroups(judging: LimitJudging, factors: CaseFactors, near: ReadonlySet<number>): Float64Array {
  const { plan } = judging.at;
  const included = judging.included.map(
    (takesPart, c) => takesPart && !near.has(plan.components[c]?.item ?? -1),
  );
  const groups = new Float64Array(judging.stride * plan.frequencies.groups.length);
  sumGroups(plan, judging.phasors, judging.stride, factors.items, included, groups);
  judging.background.staticT.forEach((component, i) => (groups[i] = (groups[i] as number) + component));
  // Limits on DC look at nothing but the first group.
  const dcOnly = judging.limit.kind !== "alternating" && judging.limit.kind !== "range";
  return dcOnly ? groups.slice(0, judging.stride) : groups;
}

const sizeOf = ({ values }: InputVector): number => product(values, 0, values, 0, values.length);

/** Inputs whose own draws are looked at: those that near items share, and the sensor's place where bounds depend on it. */
function neededApart(judging: LimitJudging, nearItems: NearItems | null): (input: InputVector) => boolean {
  const bounded = judging.at.plan.bounds.length > 0;
  return ({ kind, key }) =>
    (nearItems?.uses(kind, key) ?? false) || (bounded && (kind === "x" || kind === "y" || kind === "z"));
}

/** Leaves out inputs too small to tell. */
function droppingSmall(inputs: InputVector[], isNeeded: (input: InputVector) => boolean): InputVector[] {
  const sized = inputs.map((input) => ({ input, size: sizeOf(input) }));
  const total = sized.reduce((sum, { size }) => sum + size, 0);
  const ascending = sized.filter(({ input }) => !isNeeded(input)).sort((a, b) => a.size - b.size);
  let dropped = 0;
  const small = new Set<InputVector>();
  for (const { input, size } of ascending) {
    dropped += size;
    if (dropped > DROPPED_SHARE * total) break;
    small.add(input);
  }
  return inputs.filter((input) => !small.has(input));
}

function drawnEarth(earth: PlanEarth, random: RandomStream): PlanEarth {
  if (earth.horizontalSigmaT === 0 && earth.declinationSigmaRad === 0) return earth;
  const { northward: n, eastward: e } = earth;
  const turn = earth.declinationSigmaRad * random.normal();
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  return {
    ...earth,
    northward: [n[0] * cos + e[0] * sin, n[1] * cos + e[1] * sin, 0],
    eastward: [e[0] * cos - n[0] * sin, e[1] * cos - n[1] * sin, 0],
    elements: {
      ...earth.elements,
      horizontalT: earth.elements.horizontalT + earth.horizontalSigmaT * random.normal(),
    },
  };
}

/** Bounds of dipoles of unknown direction, with their readings and the sensor's place drawn. */
class BoundDraws {
  constructor(
    private readonly judging: LimitJudging,
    private readonly factors: CaseFactors,
  ) {}

  drawn(
    background: Float64Array,
    toleranceM: number,
    draw: (kind: FamilyKind, key: number) => number,
    random: RandomStream,
  ): Float64Array {
    const { judging, factors } = this;
    const { bounds, plan } = judging.at;
    if (plan.bounds.length === 0) return background;
    const out = Float64Array.from(background);
    const own = toleranceM * RECTANGULAR;
    const power = judging.measure.width === 3 ? 3 : 4;
    plan.bounds.forEach(({ tolerancePercent }, index) => {
      const r = bounds.distanceM[index] as number;
      const [ox, oy, oz] = bounds.outward[index] ?? [0, 0, 0];
      const moved = Math.hypot(
        ox * r + own * draw("x", 0),
        oy * r + own * draw("y", 0),
        oz * r + own * draw("z", 0),
      );
      const reading = 1 + tolerancePercent * 0.01 * RECTANGULAR * random.rectangular();
      const size = (judging.itemBounds[index] as number) * (factors.bounds[index] as number);
      const classIndex = judging.boundClasses[index] as number;
      out[classIndex] = (out[classIndex] as number) + size * reading * (r / Math.max(moved, 1e-6)) ** power;
    });
    return out;
  }
}
