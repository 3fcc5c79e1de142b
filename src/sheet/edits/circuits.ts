import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Supply } from "~/domain/plan-document/supply";
import type { Point3 } from "../geometry";
import { arrangementOf, circuitProblem, fitsSupply, rearranged } from "./arrangements";
import { copyName, freeName, newId } from "./ids";
import { tidyPoint } from "./paths";

const usualRadiusM = 0.005;

/** The one figure that stands for a supply: of unbalanced phases the first. */
const currentOf = (supply: Supply): number =>
  supply.kind === "ac3" ? (supply.currentA ?? supply.phases?.[0].currentA ?? 0) : supply.currentA;

/** A supply of another kind with the current and the frequency of the present one. */
export function supplyOf(kind: Supply["kind"], present: Supply | null): Supply {
  const currentA = present === null ? 0 : currentOf(present);
  if (kind === "dc") return { kind, currentA };
  const frequencyHz = present === null || present.kind === "dc" ? 50 : present.frequencyHz;
  const alternating = { currentA: Math.abs(currentA), frequencyHz, phaseDeg: 0, harmonics: [] };
  return kind === "ac1" ? { kind, ...alternating } : { kind, ...alternating, sequence: "abc" };
}

/** The supply with another current; unbalanced phases become balanced. */
export function withCurrent(supply: Supply, currentA: number): Supply {
  if (supply.kind !== "ac3") return { ...supply, currentA };
  const { kind, frequencyHz, phaseDeg, harmonics, sequence } = supply;
  return { kind, frequencyHz, phaseDeg, harmonics, sequence, currentA };
}

/** The figure that the current's input edits; null for unbalanced phases and for a current that is not known. */
export const balancedCurrentA = (supply: Supply | null): number | null =>
  supply === null ? null : (supply.currentA ?? null);

const supplyKinds = ["dc", "ac1", "ac3"] as const satisfies readonly Supply["kind"][];

/** The supply that an arrangement stands for while none is known: the commonest that it carries. */
export const usualSupplyKind = (circuit: Circuit): Supply["kind"] =>
  supplyKinds.find((kind) => fitsSupply(circuit, supplyOf(kind, null))) ?? "dc";

/** Chooses the kind of supply. While the current is not known only the arrangement follows; no current is entered. */
export function withSupplyKind(circuit: Circuit, kind: Supply["kind"]): Circuit {
  const chosen = withSupply(circuit, supplyOf(kind, circuit.supply));
  return circuit.supply === null ? { ...chosen, supply: null } : chosen;
}

/** Puts a supply into a circuit; an arrangement or a stray current that cannot go with it gives way to the usual one. */
export function withSupply(circuit: Circuit, supply: Supply | null): Circuit {
  if (supply === null || fitsSupply(circuit, supply)) return { ...circuit, supply };
  const usual = (): Circuit => {
    return { ...rearranged(circuit, supply.kind === "ac3" ? "trefoil" : "pair"), supply };
  };
  const candidates = [{ ...circuit, supply, strayAngleDeg: 0 }, usual(), { ...usual(), strayAngleDeg: 0 }];
  return (
    candidates.find((candidate) => circuitProblem(candidate) === null) ?? {
      ...usual(),
      strayCurrentA: null,
      strayAngleDeg: 0,
    }
  );
}

/** A circuit with everything as a rule gives it, neither traced nor loaded. */
export const blankCircuit = (id: string, name: string): Circuit => ({
  id,
  name,
  source: null,
  path: null,
  route: null,
  arrangement: arrangementOf("pair", null),
  conductorRadiusM: usualRadiusM,
  supply: null,
  currentBasis: "load-list",
  loadGroup: null,
  strayCurrentA: null,
  strayAngleDeg: 0,
  strayToleranceA: null,
  shieldingFactor: 1,
  currentTolerancePercent: null,
  spacingTolerancePercent: 0,
  positionToleranceM: 0,
});

export const updateCircuit = (
  document: PlanDocument,
  id: string,
  change: (circuit: Circuit) => Circuit,
): PlanDocument => ({
  ...document,
  circuits: document.circuits.map((circuit) => (circuit.id === id ? change(circuit) : circuit)),
});

export const isTraced = (circuit: Circuit): boolean => circuit.path !== null || circuit.route !== null;

export interface Traced {
  path: readonly Point3[];
  /** The waiting circuit that was traced; null makes a new one. */
  circuitId: string | null;
  supply: Supply | null;
}

/** A route along the traced path with its circuit on it. Tells the circuit's id, so that it can be selected. */
export function traceCircuit(
  document: PlanDocument,
  traced: Traced,
): { document: PlanDocument; circuitId: string } {
  const waiting = document.circuits.find(({ id }) => id === traced.circuitId);
  const routeId = newId("r");
  const route = { id: routeId, name: freeName("Route", document.routes), path: traced.path.map(tidyPoint) };
  const place = { route: { id: routeId, placeM: [0, 0] as [number, number] }, path: null };
  const routes = [...document.routes, route];
  if (waiting !== undefined) {
    return {
      document: updateCircuit({ ...document, routes }, waiting.id, (circuit) => ({ ...circuit, ...place })),
      circuitId: waiting.id,
    };
  }
  const blank = blankCircuit(newId("c"), freeName("Circuit", document.circuits));
  const circuit = withSupply({ ...blank, ...place }, traced.supply);
  return {
    document: { ...document, routes, circuits: [...document.circuits, circuit] },
    circuitId: circuit.id,
  };
}

/** Another circuit in a route that is there already, beside those in it. */
export function addCircuitToRoute(
  document: PlanDocument,
  routeId: string,
): { document: PlanDocument; circuitId: string } {
  const beside = document.circuits.filter(({ route }) => route?.id === routeId).length;
  const circuit: Circuit = {
    ...blankCircuit(newId("c"), freeName("Circuit", document.circuits)),
    route: { id: routeId, placeM: [0.1 * beside, 0] },
  };
  return { document: { ...document, circuits: [...document.circuits, circuit] }, circuitId: circuit.id };
}

export function addCircuit(document: PlanDocument): { document: PlanDocument; circuitId: string } {
  const circuit = blankCircuit(newId("c"), freeName("Circuit", document.circuits));
  return { document: { ...document, circuits: [...document.circuits, circuit] }, circuitId: circuit.id };
}

/** A copy of a circuit in the same route, a spacing beside; one with a path of its own is copied half a metre away. */
export function duplicateCircuit(
  document: PlanDocument,
  id: string,
): { document: PlanDocument; circuitId: string } | null {
  const original = document.circuits.find((circuit) => circuit.id === id);
  if (original === undefined) return null;
  const copy: Circuit = {
    ...original,
    id: newId("c"),
    name: copyName(original.name, document.circuits),
    route: original.route && {
      ...original.route,
      placeM: [original.route.placeM[0] + 0.1, original.route.placeM[1]],
    },
    path: original.path && original.path.map(([x, y, z]) => tidyPoint([x + 0.5, y, z])),
  };
  return { document: { ...document, circuits: [...document.circuits, copy] }, circuitId: copy.id };
}
