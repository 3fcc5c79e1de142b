import { distance, distanceToLeg, type Vector } from "~/field/vector";
import type { CircuitItem } from "../source-item";

const reaches = new WeakMap<CircuitItem, number>();

/** `reachM`, computed once an item. */
export function reachOf(item: CircuitItem): number {
  let reach = reaches.get(item);
  if (reach === undefined) {
    reach = reachM(item);
    reaches.set(item, reach);
  }
  return reach;
}

/** How far conductors of a circuit may stand off its centre line, mitres of up to 120° included, metres. */
function reachM({ conductors, legs }: CircuitItem): number {
  let reach = 0;
  for (const { points } of conductors) {
    for (const point of points.slice(1, -1)) {
      let least = Infinity;
      for (const { start, end } of legs) least = Math.min(least, distanceToLeg(start, end, point));
      reach = Math.max(reach, least);
    }
  }
  return reach;
}

/** Distance from a point to the nearest conductor axis of a circuit, metres. */
export function conductorDistanceM({ conductors }: CircuitItem, at: Vector): number {
  let least = Infinity;
  for (const { points } of conductors) {
    points.forEach((to, index) => {
      const from = points[index - 1];
      if (from) least = Math.min(least, distanceToLeg(from, to, at));
    });
  }
  return least;
}

export type Nearness = "clear" | "inside" | "inside near a bend";

/** Whether a point lies inside one of a circuit's conductors, and within 2R of a bend, where no accuracy is claimed. */
export function nearnessTo(item: CircuitItem, at: Vector): Nearness {
  const radius = item.conductorRadiusM;
  if (conductorDistanceM(item, at) >= radius) return "clear";
  const corners = item.conductors.flatMap(({ points }) => points);
  return corners.some((corner) => distance(corner, at) < 2 * radius) ? "inside near a bend" : "inside";
}
