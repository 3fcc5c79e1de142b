import type { PlanDocument } from "./plan-document/plan-document";

/** A circuit or piece of equipment as lists and bars call it. */
export interface DrawnSource {
  id: string;
  /** Its number in the order of the plan document: circuits first, then equipment. */
  key: string;
  name: string;
}

const background: DrawnSource = { id: "background", key: "B", name: "Measured background" };

/** Everything in the document that can spend a budget, numbered. */
export function numberedSources(document: Pick<PlanDocument, "circuits" | "equipment">): DrawnSource[] {
  return [...document.circuits, ...document.equipment].map(({ id, name }, index) => ({
    id,
    key: String(index + 1),
    name: name === "" ? id : name,
  }));
}

/** Circuits that are traced, and equipment: the "N sources drawn" that a verdict rests on. */
export const drawnSourceCount = (document: Pick<PlanDocument, "circuits" | "equipment">): number =>
  document.circuits.filter(({ path, route }) => path !== null || route !== null).length +
  document.equipment.length;

/** Looks a contribution's source up; what the document does not hold is called by its id. */
export function sourceFinder(sources: readonly DrawnSource[]): (id: string) => DrawnSource {
  const byId = new Map(sources.map((source) => [source.id, source]));
  return (id) => byId.get(id) ?? (id === background.id ? background : { id, key: "?", name: id });
}
