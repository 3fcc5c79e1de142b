import type { EquipmentInput } from "../../../src/domain/plan-document/equipment";

/** Machines known by one reading each, taken around them with a three-axis meter, and a reel whose slack stays on it. */
export const equipment: EquipmentInput[] = [
  {
    id: "transformer-t2",
    name: "Transformer T2",
    source: "mains",
    kind: "dipole",
    centre: [45.45, 24.2, 1],
    reading: { distanceM: 1.5, fieldT: 2.6e-6 },
    frequencyHz: 50,
    direction: null,
    tolerancePercent: 10,
  },
  {
    id: "ahu-1",
    name: "Fan motor, AHU 1",
    source: "mains",
    kind: "dipole",
    centre: [46.4, 28.2, 1.1],
    reading: { distanceM: 1, fieldT: 1.2e-6 },
    frequencyHz: 50,
    direction: null,
    tolerancePercent: 10,
  },
  {
    id: "spare-reel",
    name: "Spare reel, 24 V to the lane",
    kind: "coil",
    turns: 18,
    radiusM: 0.5,
    lengthM: 0.4,
    centre: [24.2, 2.2, 0.5],
    axis: [0, 0, 1],
    supply: { kind: "dc", currentA: 16 },
    tolerancePercent: 20,
  },
];
