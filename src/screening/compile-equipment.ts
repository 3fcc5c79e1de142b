import { supplyCurrents } from "~/domain/plan-document/phasors";
import type { ResolvedEquipment } from "~/domain/plan-document/resolved";
import type { SingleSupply } from "~/domain/plan-document/supply";
import type { ConductorSet } from "~/field/conductor-set";
import { dipoleSet } from "~/field/dipole";
import { loopSet } from "~/field/loop";
import { along, unit, type Vector } from "~/field/vector";
import type { Drive, EquipmentItem } from "./source-item";

/** Equipment as an item; null for a dipole of unknown direction, which is a bound, and for a compensated toroid, which has no field outside. */
export function compileEquipment(equipment: ResolvedEquipment, path: string): EquipmentItem | null {
  const set = setOf(equipment);
  if (!set) return null;
  return {
    kind: "equipment",
    id: equipment.id,
    equipment,
    path,
    source: equipment.source,
    shieldingFactor: equipment.shieldingFactor,
    sets: [set],
    drives: drivesOf(equipment),
  };
}

/** Centres of a coil's turns: turn i at −L/2 + (i + ½)L/N along its axis. */
export function turnCentres(centre: Vector, axis: Vector, lengthM: number, turns: number): Vector[] {
  const n = unit(axis);
  return Array.from({ length: turns }, (_, i) =>
    along(centre, n, -lengthM / 2 + ((i + 0.5) * lengthM) / turns),
  );
}

function setOf(equipment: ResolvedEquipment): ConductorSet | null {
  switch (equipment.kind) {
    case "coil": {
      const { centre, axis, lengthM, turns, radiusM } = equipment;
      return loopSet(turnCentres(centre, axis, lengthM, turns), axis, radiusM);
    }
    case "toroid":
      // Outside, the winding's advance around the ring is all that is left of it: one turn of the mean radius.
      return equipment.compensated
        ? null
        : loopSet([equipment.centre], equipment.axis, equipment.meanRadiusM);
    case "dipole": {
      const { centre, direction, reading } = equipment;
      return direction && dipoleSet(centre, direction, reading.distanceM, reading.fieldT);
    }
  }
}

function drivesOf(equipment: ResolvedEquipment): Drive[] {
  if (equipment.kind === "dipole") {
    const { frequencyHz } = equipment;
    return [driveOf(frequencyHz, frequencyHz === 0 ? 0 : 1, 1, 0)];
  }
  return suppliedDrives(equipment.supply);
}

function suppliedDrives(supply: SingleSupply): Drive[] {
  return supplyCurrents(supply).map(({ frequencyHz, order, currents }) => {
    const { re, im } = currents.go ?? { re: 0, im: 0 };
    return driveOf(frequencyHz, order, re, im);
  });
}

function driveOf(frequencyHz: number, order: number, re: number, im: number): Drive {
  const currents = Float64Array.of(re, im);
  return { frequencyHz, order, currents, scaling: currents };
}
