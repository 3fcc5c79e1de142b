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

/** Sets the factor of a circuit or equipment in a load case; 1 is the default and is not written. */
export const setFactor = (
  document: PlanDocument,
  loadCaseId: string,
  sourceId: string,
  factor: number,
): PlanDocument => ({
  ...document,
  loadCases: document.loadCases.map((loadCase) => {
    if (loadCase.id !== loadCaseId) return loadCase;
    const others = Object.fromEntries(Object.entries(loadCase.factors).filter(([id]) => id !== sourceId));
    return { ...loadCase, factors: factor === 1 ? others : { ...others, [sourceId]: factor } };
  }),
});

/** A negative factor reverses DC; an alternating current is turned by its phase. */
export function mayReverse(document: PlanDocument, sourceId: string): boolean {
  const item = document.equipment.find(({ id }) => id === sourceId);
  if (item !== undefined) return item.kind === "dipole" ? item.frequencyHz === 0 : item.supply.kind === "dc";
  return document.circuits.find(({ id }) => id === sourceId)?.supply?.kind === "dc";
}
