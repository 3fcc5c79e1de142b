import { MU_0 } from "~/domain/units";
import { circulation, gaussLegendre, linkedCirculation } from "~/field/circulation";
import type { Leg } from "~/field/section-frames";
import { add, along, distance, distanceToLeg, scale, subtract, type Vector } from "~/field/vector";
import type { CompiledPlan, Component } from "../compile";
import type { CircuitItem } from "../source-item";
import { reachOf } from "./near-conductors";

const POLYGONS = 2;
const CORNERS = 8;
const RULE = gaussLegendre(12);
/** Radii tried around a leg, as shares of its length. */
const RADIUS_SHARES = [0.4, 0.2, 0.1, 0.05, 0.025, 0.0125, 0.00625];
/** Least clearance from conductors that a polygon may have, as a share of its radius. */
const LEAST_CLEARANCE = 0.15;
/** Circuits looked at, heaviest first, until enough polygons stand clear of conductors. */
const CIRCUITS_TRIED = 12;

/**
 * Draws closed polygons around the heaviest circuits, integrates B·dl around them numerically and compares with μ₀ΣI through
 * them. Returns the largest error relative to μ₀ times the largest single current, null where nothing flows or no polygon stands clear.
 */
export function circulationError(plan: CompiledPlan): number | null {
  const checked = plan.items.map((item) => item.kind === "circuit" && !item.twisted);
  const components = plan.components.filter(({ item }) => checked[item]);
  const largestA = Math.max(0, ...components.map(largestCurrentA));
  if (largestA === 0) return null;
  const polygons = heaviest(plan, components)
    .flatMap((item) => polygonAround(item, plan) ?? [])
    .slice(0, POLYGONS);
  if (polygons.length === 0) return null;
  const errors = polygons.map((polygon) => errorAround(plan, components, polygon));
  return Math.max(...errors) / (MU_0 * largestA);
}

function largestCurrentA({ drive: { currents } }: Component): number {
  let largest = 0;
  for (let i = 0; i < currents.length; i += 2) {
    largest = Math.max(largest, Math.hypot(currents[i] as number, currents[i + 1] as number));
  }
  return largest;
}

function heaviest(plan: CompiledPlan, components: Component[]): CircuitItem[] {
  const currents = new Map<number, number>();
  for (const component of components) {
    currents.set(component.item, Math.max(currents.get(component.item) ?? 0, largestCurrentA(component)));
  }
  const ranked = [...currents].sort(([a, currentA], [b, currentB]) => currentB - currentA || a - b);
  return ranked.slice(0, CIRCUITS_TRIED).flatMap(([index]) => {
    const item = plan.items[index];
    return item?.kind === "circuit" ? [item] : [];
  });
}

/** The polygon across the circuit's longest leg that keeps the largest clearance, relative to its size, from all legs. */
function polygonAround({ legs }: CircuitItem, plan: CompiledPlan): ClearPolygon[] | null {
  const longest = legs.reduce((best, leg) => (leg.lengthM > best.lengthM ? leg : best));
  const circuits = plan.items.flatMap((item) => (item.kind === "circuit" ? [item] : []));
  const candidates = RADIUS_SHARES.map((share) => {
    const radiusM = share * longest.lengthM;
    const polygon = corners(longest, radiusM);
    return { polygon, radiusM, clearanceM: clearance(polygon, circuits) };
  });
  const best = candidates.reduce((one, other) =>
    other.clearanceM / other.radiusM > one.clearanceM / one.radiusM ? other : one,
  );
  return best.clearanceM > LEAST_CLEARANCE * best.radiusM ? [best] : null;
}

interface ClearPolygon {
  polygon: Vector[];
  clearanceM: number;
}

/** A regular polygon across the middle of a leg; its hub stays off the axis, where conductors run. */
function corners(leg: Leg, radiusM: number): Vector[] {
  const middle = along(leg.start, leg.t, 0.47 * leg.lengthM);
  const hub = add(middle, add(scale(leg.u, 0.11 * radiusM), scale(leg.v, 0.07 * radiusM)));
  // Right-handed about t: from u towards −v.
  return Array.from({ length: CORNERS }, (_, i) => {
    const angle = (2 * Math.PI * (i + 0.3)) / CORNERS;
    return add(hub, add(scale(leg.u, radiusM * Math.cos(angle)), scale(leg.v, -radiusM * Math.sin(angle))));
  });
}

function clearance(polygon: Vector[], circuits: CircuitItem[]): number {
  let least = Infinity;
  const places = polygon.flatMap((corner, index) => [
    corner,
    scale(add(corner, polygon[(index + 1) % polygon.length] ?? corner), 0.5),
  ]);
  for (const item of circuits) {
    for (const { start, end } of item.legs) {
      for (const at of places) least = Math.min(least, distanceToLeg(start, end, at) - reachOf(item));
    }
  }
  return least;
}

function errorAround(
  plan: CompiledPlan,
  components: Component[],
  { polygon, clearanceM }: ClearPolygon,
): number {
  const used = new Set(components.map(({ item }) => item));
  const addFields = (x: number, y: number, z: number, out: Float64Array) => {
    for (const index of used) {
      const firstSet = plan.firstSets[index] ?? 0;
      plan.items[index]?.sets.forEach((set, k) => set.addField(x, y, z, out, 3 * (firstSet + k)));
    }
  };
  const integrated = circulation(subdivided(polygon, clearanceM), plan.setCount, addFields, RULE);
  const expected = expectedCirculation(plan, used, polygon);
  const errors = new Float64Array(2 * plan.frequencies.groups.length);
  for (const { firstSet, group, drive } of components) {
    for (let k = 0; 2 * k < drive.currents.length; k++) {
      const error = (integrated[firstSet + k] as number) - (expected[firstSet + k] as number);
      errors[2 * group] = (errors[2 * group] as number) + error * (drive.currents[2 * k] as number);
      errors[2 * group + 1] =
        (errors[2 * group + 1] as number) + error * (drive.currents[2 * k + 1] as number);
    }
  }
  return plan.frequencies.groups.reduce(
    (worst, _, group) =>
      Math.max(worst, Math.hypot(errors[2 * group] as number, errors[2 * group + 1] as number)),
    0,
  );
}

/** The polygon with sides no longer than the clearance, over which the quadrature is exact to rounding. */
function subdivided(polygon: Vector[], clearanceM: number): Vector[] {
  return polygon.flatMap((from, index) => {
    const to = polygon[(index + 1) % polygon.length] ?? from;
    const panels = Math.min(16, Math.ceil(distance(from, to) / clearanceM));
    return Array.from({ length: panels }, (_, i) => along(from, subtract(to, from), i / panels));
  });
}

function expectedCirculation(plan: CompiledPlan, used: Set<number>, polygon: Vector[]): Float64Array {
  const expected = new Float64Array(plan.setCount);
  for (const index of used) {
    const item = plan.items[index];
    if (item?.kind !== "circuit") continue;
    for (const { set, share, points } of item.conductors) {
      const at = (plan.firstSets[index] ?? 0) + set;
      expected[at] = (expected[at] as number) + share * linkedCirculation(polygon, points);
    }
  }
  return expected;
}
