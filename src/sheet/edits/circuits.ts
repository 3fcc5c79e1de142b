import type { Arrangement } from "~/domain/plan-document/arrangement";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Supply } from "~/domain/plan-document/supply";
import type { Point3 } from "../geometry";
import { copyName, freeName, newId } from "./ids";
import { tidyPoint } from "./paths";

/** Arrangements that the sheet offers, commonest first, with the supplies that they carry. */
export const offeredArrangements = [
  { kind: "single", label: "single conductor", supplies: ["dc", "ac1"] },
  { kind: "pair", label: "pair, go and return", supplies: ["dc", "ac1"] },
  { kind: "flat", label: "flat, three in a row", supplies: ["ac3"] },
  { kind: "trefoil", label: "trefoil", supplies: ["ac3"] },
  { kind: "quad", label: "square, three and neutral", supplies: ["ac3"] },
  { kind: "flat-n", label: "flat, three and neutral", supplies: ["ac3"] },
] as const satisfies readonly {
  kind: Arrangement["kind"];
  label: string;
  supplies: readonly Supply["kind"][];
}[];

export type OfferedArrangement = (typeof offeredArrangements)[number]["kind"];

const offered = (kind: Arrangement["kind"]) => offeredArrangements.find((entry) => entry.kind === kind);

export const fitsSupply = (kind: Arrangement["kind"], supply: Supply["kind"]): boolean =>
  offered(kind)?.supplies.some((fitting) => fitting === supply) ?? true;

/** Axis-to-axis distance to begin with: small single-core cables side by side. */
const usualSpacingM = 0.03;
const usualRadiusM = 0.005;

const spacingOf = (arrangement: Arrangement): number =>
  "spacingM" in arrangement ? arrangement.spacingM : usualSpacingM;

/** The arrangement of another kind with the spacing and the turn of the present one. */
export function arrangementOf(kind: OfferedArrangement, present: Arrangement | null): Arrangement {
  const rollDeg = present?.rollDeg ?? 0;
  if (kind === "single") return { kind, rollDeg, parallel: null };
  const spacingM = present === null ? usualSpacingM : spacingOf(present);
  return { kind, spacingM, rollDeg, parallel: null };
}

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

/** Puts a supply into a circuit; an arrangement that cannot carry it gives way to the usual one that can. */
export function withSupply(circuit: Circuit, supply: Supply | null): Circuit {
  if (supply === null || fitsSupply(circuit.arrangement.kind, supply.kind)) return { ...circuit, supply };
  const kind = supply.kind === "ac3" ? "trefoil" : "pair";
  return { ...circuit, supply, arrangement: arrangementOf(kind, circuit.arrangement) };
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
