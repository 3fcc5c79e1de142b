import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { freeName, newId } from "./ids";

export function addLoadCase(document: PlanDocument): PlanDocument {
  const loadCase = { id: newId("l"), name: freeName("Load case", document.loadCases), factors: {} };
  return { ...document, loadCases: [...document.loadCases, loadCase] };
}

export const renameLoadCase = (document: PlanDocument, id: string, name: string): PlanDocument => ({
  ...document,
  loadCases: document.loadCases.map((loadCase) => (loadCase.id === id ? { ...loadCase, name } : loadCase)),
});

/** Sets the factor of a circuit in a load case; 1 is the default and is not written. */
export const setFactor = (
  document: PlanDocument,
  loadCaseId: string,
  circuitId: string,
  factor: number,
): PlanDocument => ({
  ...document,
  loadCases: document.loadCases.map((loadCase) => {
    if (loadCase.id !== loadCaseId) return loadCase;
    const others = Object.fromEntries(Object.entries(loadCase.factors).filter(([id]) => id !== circuitId));
    return { ...loadCase, factors: factor === 1 ? others : { ...others, [circuitId]: factor } };
  }),
});

/** A negative factor reverses DC; an alternating current is turned by its phase. */
export const mayReverse = (document: PlanDocument, circuitId: string): boolean =>
  document.circuits.find(({ id }) => id === circuitId)?.supply?.kind === "dc";
