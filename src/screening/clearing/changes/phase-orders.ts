import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { PreparedPlan } from "../../prepared-plan";
import type { Steps } from "../../steps";
import { bestChoice } from "./order-search";
import { OrderCost } from "./order-cost";
import { ORDERS, ordersOf, reordered, type OrderPlace } from "./orders";
import { called, type Proposal } from "./proposal";

/**
 * The best phase orders of the parallel sets of each circuit, and of all circuits that share a route or a path, for the sensors at
 * `targets`: the sum of their worst values over limits is least. Only among what `circuits` holds.
 */
export function* phaseOrderChanges(
  document: PlanDocument,
  prepared: PreparedPlan,
  targets: readonly number[],
  circuits: readonly Circuit[],
): Steps<Proposal[]> {
  const proposals: Proposal[] = [];
  for (const group of orderGroups(document, circuits)) {
    const places = group.flatMap((circuit) =>
      ordersOf(circuit).map((_, set): OrderPlace => ({ circuit, set })),
    );
    const present = group.flatMap((circuit) => ordersOf(circuit).map((order) => ORDERS.indexOf(order)));
    const cost = new OrderCost(prepared, targets, places, present);
    const best = yield* bestChoice(places.length, ORDERS.length, present, (choice) => cost.of(choice));
    if (best.choice.every((order, place) => order === present[place])) continue;
    proposals.push(proposalOf(group, places, best.choice, best.exhaustive));
  }
  return proposals;
}

function orderGroups(document: PlanDocument, circuits: readonly Circuit[]): Circuit[][] {
  const byWay = new Map<string, Circuit[]>();
  for (const circuit of document.circuits) {
    if (ordersOf(circuit).length === 0) continue;
    const way = circuit.route
      ? `route ${circuit.route.id}`
      : circuit.path && `path ${JSON.stringify(circuit.path)}`;
    if (way) byWay.set(way, [...(byWay.get(way) ?? []), circuit]);
  }
  const alone = circuits.filter((circuit) => ordersOf(circuit).length > 1).map((circuit) => [circuit]);
  const shared = [...byWay.values()].filter(
    (group) => group.length > 1 && group.some((circuit) => circuits.includes(circuit)),
  );
  return [...alone, ...shared];
}

function proposalOf(
  group: readonly Circuit[],
  places: readonly OrderPlace[],
  choice: readonly number[],
  exhaustive: boolean,
): Proposal {
  const changed = group.map((circuit) =>
    reordered(
      circuit,
      places.flatMap((place, i) => (place.circuit === circuit ? [ORDERS[choice[i] as number] ?? "abc"] : [])),
    ),
  );
  const orders = changed.map((circuit) => `${called(circuit)} ${ordersOf(circuit).join("-")}`);
  const note = exhaustive ? "" : " (the best found, not every combination was tried)";
  const words =
    group.length === 1
      ? `Connect the parallel sets in the phase orders ${orders.join("")}${note}`
      : `Connect the circuits that share a way in the phase orders ${orders.join(", ")}${note}`;
  return {
    kind: "phase-orders",
    words,
    ids: group.map(({ id }) => id),
    patch: { circuits: changed, routes: [] },
    movesSingles: false,
  };
}
