import type { LoadCase, PlanDocument } from "~/domain/plan-document/plan-document";

const without = <T extends { id: string }>(list: T[], ids: ReadonlySet<string>): T[] =>
  list.filter(({ id }) => !ids.has(id));

const withoutFactors = (loadCases: readonly LoadCase[], ids: ReadonlySet<string>): LoadCase[] =>
  loadCases.map((loadCase) => ({
    ...loadCase,
    factors: Object.fromEntries(Object.entries(loadCase.factors).filter(([id]) => !ids.has(id))),
  }));

/** Takes circuits out with all that names them: their factors in load cases and their lines of the schedule. */
export function removeCircuits(document: PlanDocument, circuitIds: readonly string[]): PlanDocument {
  const ids = new Set(circuitIds);
  const { schedule } = document.drawing;
  return {
    ...document,
    circuits: without(document.circuits, ids),
    loadCases: withoutFactors(document.loadCases, ids),
    drawing: {
      ...document.drawing,
      ...(schedule && { schedule: schedule.filter(({ circuitId }) => !ids.has(circuitId)) }),
    },
  };
}

/** Takes a route out; the circuits in it stay and wait to be traced again. */
export function removeRoute(document: PlanDocument, routeId: string): PlanDocument {
  return {
    ...document,
    routes: without(document.routes, new Set([routeId])),
    circuits: document.circuits.map((circuit) =>
      circuit.route?.id === routeId ? { ...circuit, route: null, path: null } : circuit,
    ),
  };
}

/** Takes a circuit out, and its route too when nothing else runs in it. */
export function removeCircuitAndEmptyRoute(document: PlanDocument, circuitId: string): PlanDocument {
  const routeId = document.circuits.find(({ id }) => id === circuitId)?.route?.id;
  const rest = removeCircuits(document, [circuitId]);
  return routeId !== undefined && !rest.circuits.some(({ route }) => route?.id === routeId)
    ? removeRoute(rest, routeId)
    : rest;
}

export const removeSensors = (document: PlanDocument, sensorIds: readonly string[]): PlanDocument => ({
  ...document,
  sensors: without(document.sensors, new Set(sensorIds)),
});

/** Takes equipment out with its factors in load cases. */
export function removeEquipment(document: PlanDocument, equipmentIds: readonly string[]): PlanDocument {
  const ids = new Set(equipmentIds);
  return {
    ...document,
    equipment: without(document.equipment, ids),
    loadCases: withoutFactors(document.loadCases, ids),
  };
}

export const removeLoadCase = (document: PlanDocument, loadCaseId: string): PlanDocument => ({
  ...document,
  loadCases: without(document.loadCases, new Set([loadCaseId])),
});
