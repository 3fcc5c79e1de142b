import { fillSetsField, packSets, type ConductorSet } from "~/field/conductor-set";
import type { Vector } from "~/field/vector";
import { boundClass, boundsAt } from "./bounds";
import type { CompiledPlan } from "./compile";
import type { PlanEarth } from "./earth";
import type { CaseFactors } from "./load-cases";
import type { LimitMeasure } from "./measures/measure-of";

/** Points measured at once: enough for the kernel, few enough for the cache. */
export const TILE_POINTS = 64;

/** Fills `values` with a quantity at every point (x, y, z a point, m), backgrounds left out. */
export type TileMeasure = (points: Float64Array, values: Float64Array) => void;

/** What one set gives to one group per tesla per ampere of influence. */
interface Share {
  /** Place of the set among those that take part. */
  set: number;
  group: number;
  re: number;
  im: number;
}

/** The measure in one load case, for tiles of at most TILE_POINTS points; sets that take no part are not computed. */
export function tileMeasure(
  plan: CompiledPlan,
  earth: PlanEarth | null,
  { includes, value }: LimitMeasure,
  factors: CaseFactors,
): TileMeasure {
  const { shares, sets } = sharesOf(plan, includes, factors);
  const packed = packSets(sets);
  const stride = 6 * plan.frequencies.groups.length;
  const influence = new Float64Array(3 * sets.length * TILE_POINTS);
  const tile = new Float64Array(stride * TILE_POINTS);
  const groupsOf = Array.from({ length: TILE_POINTS }, (_, p) => tile.subarray(stride * p, stride * (p + 1)));
  const bounds = new Float64Array(plan.frequencies.classesHz.length);
  const classes = plan.bounds.map((bound) =>
    includes(bound.frequencyHz) ? boundClass(bound, plan.frequencies) : -1,
  );
  return (points, values) => {
    fillSetsField(packed, points, influence);
    tile.fill(0);
    for (const { set, group, re, im } of shares) {
      let from = points.length * set;
      let to = 6 * group;
      for (let p = 0; p < values.length; p++, from += 3, to += stride) {
        for (let i = 0; i < 3; i++) {
          const g = influence[from + i] as number;
          tile[to + i] = (tile[to + i] as number) + re * g;
          tile[to + 3 + i] = (tile[to + 3 + i] as number) + im * g;
        }
      }
    }
    for (let p = 0; p < values.length; p++) {
      bounds.fill(0);
      if (plan.bounds.length > 0) {
        const at = [points[3 * p], points[3 * p + 1], points[3 * p + 2]] as Vector;
        boundsAt(plan.bounds, at).fieldT.forEach((fieldT, index) => {
          const classIndex = classes[index] as number;
          if (classIndex < 0) return;
          bounds[classIndex] = (bounds[classIndex] as number) + fieldT * (factors.bounds[index] as number);
        });
      }
      values[p] = value({ groups: groupsOf[p] as Float64Array, bounds, earth });
    }
  };
}

function sharesOf(plan: CompiledPlan, includes: LimitMeasure["includes"], factors: CaseFactors) {
  const places = new Map<number, number>();
  const shares: Share[] = [];
  const sets: ConductorSet[] = [];
  plan.items.forEach((item, index) => {
    const takesPart = item.drives.some(({ frequencyHz }) => includes(frequencyHz));
    if (!takesPart || factors.items[index] === 0) return;
    places.set(index, sets.length);
    sets.push(...item.sets);
  });
  for (const { item, group, drive } of plan.components) {
    const first = places.get(item);
    if (first === undefined || !includes(drive.frequencyHz)) continue;
    const factor = (factors.items[item] as number) * (plan.items[item]?.shieldingFactor ?? 0);
    for (let k = 0; 2 * k < drive.currents.length; k++) {
      const [re, im] = [
        factor * (drive.currents[2 * k] as number),
        factor * (drive.currents[2 * k + 1] as number),
      ];
      shares.push({ set: first + k, group, re, im });
    }
  }
  return { sets, shares };
}
