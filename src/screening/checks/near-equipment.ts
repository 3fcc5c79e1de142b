import type { ResolvedEquipment } from "~/domain/plan-document/resolved";
import { along, distance, dot, subtract, unit, type Vector } from "~/field/vector";

/** What is to be said of a point close to equipment: the words, and whether the field there is judged at all. */
export interface EquipmentNearness {
  text: string;
  capped: boolean;
}

/** Null where the point is clear of the equipment. */
export function nearnessToEquipment(equipment: ResolvedEquipment, at: Vector): EquipmentNearness | null {
  switch (equipment.kind) {
    case "coil": {
      const { heightM, rhoM } = cylindrical(equipment.centre, equipment.axis, at);
      const inside = rhoM < equipment.radiusM && Math.abs(heightM) <= equipment.lengthM / 2;
      return inside ? { text: "lies inside the coil", capped: false } : null;
    }
    case "toroid": {
      const { heightM, rhoM } = cylindrical(equipment.centre, equipment.axis, at);
      const fromRing = Math.hypot(rhoM - equipment.meanRadiusM, heightM);
      return fromRing < equipment.minorRadiusM
        ? { text: "lies inside the winding of the toroid, where its field is not judged", capped: true }
        : null;
    }
    case "dipole": {
      const { distanceM } = equipment.reading;
      return distance(equipment.centre, at) < distanceM
        ? {
            text: `is nearer than the ${distanceM} m at which it was measured, where its field is not known`,
            capped: true,
          }
        : null;
    }
  }
}

function cylindrical(centre: Vector, axis: Vector, at: Vector): { heightM: number; rhoM: number } {
  const n = unit(axis);
  const from = subtract(at, centre);
  const heightM = dot(from, n);
  return { heightM, rhoM: Math.hypot(...along(from, n, -heightM)) };
}
