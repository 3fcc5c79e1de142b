import type { OpenEnd } from "~/domain/screening-result";
import { distance, type Vector } from "~/field/vector";
import type { CompiledPlan, Component } from "../compile";
import { caseFactors, type CaseFactors } from "../load-cases";

/** Path ends nearer to each other than this meet, metres. */
const MEETING_M = 1e-3;
/** Imbalance that is reported, as a share of the largest current that meets there. */
const NOTICED = 1e-3;

interface End {
  at: Vector;
  item: number;
  /** −1 where the path starts (its net current comes in), +1 where it ends (it goes out). */
  sense: -1 | 1;
}

/**
 * Where paths end or meet and the net currents do not balance: the largest imbalance over the load cases, rms over
 * frequencies, in amperes, with its place and circuits.
 */
export function openEnds(plan: CompiledPlan): OpenEnd[] {
  const cases = caseFactors(plan);
  const byItem = plan.items.map((): Component[] => []);
  for (const component of plan.components) byItem[component.item]?.push(component);
  return meetings(plan).flatMap((ends) => {
    const [first] = ends;
    if (!first) return [];
    const currentA = Math.max(...cases.map((factors) => imbalanceA(byItem, ends, factors)));
    const circuitIds = [...new Set(ends.map(({ item }) => plan.items[item]?.id ?? ""))];
    return currentA > 0 ? [{ at: [...first.at] as [number, number, number], currentA, circuitIds }] : [];
  });
}

/** Path ends by place, in the document's order; found through a grid so that many circuits stay cheap. */
function meetings(plan: CompiledPlan): End[][] {
  const clusters: End[][] = [];
  const grid = new Map<string, End[][]>();
  const cell = (at: Vector, shift: Vector) =>
    at.map((c, i) => Math.floor(c / MEETING_M) + (shift[i] ?? 0)).join();
  for (const end of pathEnds(plan)) {
    const near = NEIGHBOURS.flatMap((shift) => grid.get(cell(end.at, shift)) ?? []);
    const cluster = near.find(([first]) => first && distance(first.at, end.at) <= MEETING_M);
    if (cluster) {
      cluster.push(end);
      continue;
    }
    const started = [end];
    clusters.push(started);
    const key = cell(end.at, [0, 0, 0]);
    grid.set(key, [...(grid.get(key) ?? []), started]);
  }
  return clusters;
}

const SHIFTS = [-1, 0, 1];
const NEIGHBOURS: Vector[] = SHIFTS.flatMap((x) =>
  SHIFTS.flatMap((y) => SHIFTS.map((z): Vector => [x, y, z])),
);

function pathEnds(plan: CompiledPlan): End[] {
  return plan.items.flatMap((item, index): End[] => {
    if (item.kind !== "circuit") return [];
    const start = item.legs[0]?.start;
    const end = item.legs[item.legs.length - 1]?.end;
    if (!start || !end) return [];
    return [
      { at: start, item: index, sense: -1 },
      { at: end, item: index, sense: 1 },
    ];
  });
}

function imbalanceA(byItem: readonly Component[][], ends: End[], factors: CaseFactors): number {
  const sums = new Map<number, [number, number]>();
  let largestA = 0;
  for (const { item, sense } of ends) {
    for (const { group, drive } of byItem[item] ?? []) {
      const factor = (factors.items[item] as number) * sense;
      const sum = sums.get(group) ?? [0, 0];
      for (let i = 0; i < drive.currents.length; i += 2) {
        const [re, im] = [factor * (drive.currents[i] as number), factor * (drive.currents[i + 1] as number)];
        sum[0] += re;
        sum[1] += im;
        largestA = Math.max(largestA, Math.hypot(re, im));
      }
      sums.set(group, sum);
    }
  }
  const total = Math.sqrt([...sums.values()].reduce((squares, [re, im]) => squares + re * re + im * im, 0));
  return total > NOTICED * largestA ? total : 0;
}
