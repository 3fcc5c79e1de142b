import type { Equipment, EquipmentKind } from "~/domain/plan-document/equipment";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Point3 } from "../geometry";
import { copyName, newId } from "./ids";
import { tidyPoint } from "./paths";

export const equipmentKinds = ["coil", "toroid", "dipole"] as const satisfies readonly EquipmentKind[];

export const equipmentTitles: Record<EquipmentKind, string> = {
  coil: "Coil or spare reel",
  toroid: "Toroid",
  dipole: "Dipole known by a reading",
};

/** The one word that stands beside a mark. */
export const equipmentWords: Record<EquipmentKind, string> = {
  coil: "coil",
  toroid: "toroid",
  dipole: "dipole",
};

/** What new equipment is called, with a number. */
export const equipmentStems: Record<EquipmentKind, string> = {
  coil: "Reel",
  toroid: "Toroid",
  dipole: "Dipole",
};

export const updateEquipment = (
  document: PlanDocument,
  id: string,
  change: (item: Equipment) => Equipment,
): PlanDocument => ({
  ...document,
  equipment: document.equipment.map((item) => (item.id === id ? change(item) : item)),
});

export const addEquipment = (document: PlanDocument, item: Equipment): PlanDocument => ({
  ...document,
  equipment: [...document.equipment, item],
});

/** A copy half a metre to the right. */
export function duplicateEquipment(
  document: PlanDocument,
  id: string,
): { document: PlanDocument; equipmentId: string } | null {
  const original = document.equipment.find((item) => item.id === id);
  if (original === undefined) return null;
  const [x, y, z] = original.centre;
  const copy: Equipment = {
    ...original,
    id: newId("e"),
    name: copyName(original.name, document.equipment),
    centre: tidyPoint([x + 0.5, y, z]),
  };
  return { document: addEquipment(document, copy), equipmentId: copy.id };
}

/** The direction that a piece of equipment has; null for a dipole whose direction is not known. */
export const axisOf = (item: Equipment): Point3 | null =>
  item.kind === "dipole" ? item.direction : item.axis;

export const withAxis = (item: Equipment, axis: [number, number, number] | null): Equipment => {
  if (item.kind === "dipole") return { ...item, direction: axis };
  return axis === null ? item : { ...item, axis };
};

/** What flows in it or was read beside it, in words. */
export function driveWords(item: Equipment): string {
  if (item.kind === "dipole") {
    const { distanceM, fieldT } = item.reading;
    const read = `${Number((fieldT * 1e6).toPrecision(4))} µT at ${distanceM} m`;
    return item.frequencyHz === 0 ? `${read}, DC` : `${read}, ${item.frequencyHz} Hz`;
  }
  const { supply, turns } = item;
  const amperes = `${supply.currentA} A ${supply.kind === "dc" ? "DC" : `at ${supply.frequencyHz} Hz`}`;
  return `${turns} ${turns === 1 ? "turn" : "turns"}, ${amperes}`;
}
