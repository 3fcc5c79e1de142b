import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { aidOf, type AidKind } from "./edits/aids";
import { circuitsOn, ownerOfCircuit, pathOf, sameOwner, type PathOwner } from "./edits/paths";

export type SelectedItem =
  | { kind: "sensor"; id: string }
  | { kind: "equipment"; id: string }
  | { kind: "circuit"; id: string }
  | { kind: "route"; id: string }
  | { kind: "aid"; aid: AidKind; id: string }
  | { kind: "vertex"; owner: PathOwner; index: number };

export type Selection = readonly SelectedItem[];

export const sameItem = (a: SelectedItem, b: SelectedItem): boolean =>
  a.kind === "vertex"
    ? b.kind === "vertex" && a.index === b.index && sameOwner(a.owner, b.owner)
    : b.kind !== "vertex" && a.kind === b.kind && a.id === b.id && aidKindOf(a) === aidKindOf(b);

const aidKindOf = (item: SelectedItem): AidKind | null => (item.kind === "aid" ? item.aid : null);

export const isSelected = (selection: Selection, item: SelectedItem): boolean =>
  selection.some((other) => sameItem(other, item));

export const toggled = (selection: Selection, item: SelectedItem): Selection =>
  isSelected(selection, item) ? selection.filter((other) => !sameItem(other, item)) : [...selection, item];

/** What stands for a path in the selection: its circuit where there is just one, else the route. */
export function itemOfPath(document: PlanDocument, owner: PathOwner): SelectedItem {
  const [only, ...others] = circuitsOn(document, owner);
  if (only !== undefined && others.length === 0) return { kind: "circuit", id: only.id };
  return owner.list === "routes" ? { kind: "route", id: owner.id } : { kind: "circuit", id: owner.id };
}

/** The paths whose vertices show: those of selected circuits, routes and vertices. */
export function selectedOwners(document: PlanDocument, selection: Selection): PathOwner[] {
  const owners: PathOwner[] = [];
  for (const item of selection) {
    const owner = ownerOfItem(document, item);
    if (owner !== null && !owners.some((other) => sameOwner(other, owner))) owners.push(owner);
  }
  return owners;
}

function ownerOfItem(document: PlanDocument, item: SelectedItem): PathOwner | null {
  if (item.kind === "vertex") return item.owner;
  if (item.kind === "route") return { list: "routes", id: item.id };
  const circuit = item.kind === "circuit" ? document.circuits.find(({ id }) => id === item.id) : undefined;
  return circuit === undefined ? null : ownerOfCircuit(circuit);
}

/** Leaves out what is no longer there, after an undo or somebody else's save. */
export function stillThere(document: PlanDocument, selection: Selection): Selection {
  const kept = selection.filter((item) => {
    if (item.kind === "vertex") return pathOf(document, item.owner)?.[item.index] !== undefined;
    if (item.kind === "aid") return aidOf(document, item.aid, item.id) !== undefined;
    const list = {
      sensor: document.sensors,
      equipment: document.equipment,
      circuit: document.circuits,
      route: document.routes,
    }[item.kind];
    return list.some(({ id }: { id: string }) => id === item.id);
  });
  return kept.length === selection.length ? selection : kept;
}
