import type { PlanDocumentInput } from "~/domain/plan-document/plan-document";

/** A corner of a workshop: a battery string overhead, a riser in the corner, and three devices that meet them differently. */
export const samplePlan: PlanDocumentInput = {
  format: "stillneedle-plan",
  version: 1,
  name: "Sample: workshop corner",
  frame: { northBearingDeg: 0 },
  earthField: {
    mode: "model",
    latitudeDeg: 54.2,
    longitudeDeg: 7.9,
    altitudeM: 10,
    date: "2026-12-01",
  },
  circuits: [
    {
      id: "string",
      name: "Battery string",
      path: [
        [0, 4.4, 2.6],
        [5.2, 4.4, 2.6],
        [5.2, 0, 2.6],
      ],
      arrangement: { kind: "pair", spacingM: 0.03 },
      conductorRadiusM: 0.0057,
      supply: { kind: "dc", currentA: 125 },
      currentBasis: "load-list",
      strayCurrentA: 0,
      positionToleranceM: 0.05,
    },
    {
      id: "riser",
      name: "Riser",
      path: [
        [7.4, 4.6, 0],
        [7.4, 4.6, 3.6],
      ],
      arrangement: { kind: "trefoil", spacingM: 0.027 },
      conductorRadiusM: 0.00925,
      supply: { kind: "ac3", currentA: 250, frequencyHz: 50 },
      currentBasis: "rating-plate",
      strayCurrentA: 0,
      positionToleranceM: 0.02,
    },
    {
      id: "charger",
      name: "Charger",
      path: [
        [0, 0.5, 0.3],
        [2.6, 0.5, 0.3],
        [2.6, 0.5, 1.1],
      ],
      arrangement: { kind: "pair", spacingM: 0.012 },
      conductorRadiusM: 0.00155,
      supply: { kind: "ac1", currentA: 32, frequencyHz: 50 },
      currentBasis: "breaker",
      strayCurrentA: 0,
      positionToleranceM: 0.02,
    },
  ],
  loadCases: [
    { id: "day", name: "Day", factors: { string: 0.2, charger: 0 } },
    { id: "discharge", name: "Discharge", factors: { riser: 0.4 } },
  ],
  sensors: [
    {
      id: "compass",
      name: "Compass, dock",
      position: [4.5, 3.8, 1.75],
      positionToleranceM: 0.02,
      limits: [
        { id: "dc", kind: "static", limitT: 0.5e-6 },
        { id: "heading", kind: "heading", limitDeg: 1 },
      ],
    },
    {
      id: "head",
      name: "Magnetoresistive head, press",
      position: [1.9, 2.3, 1.1],
      positionToleranceM: 0.02,
      limits: [{ id: "dc", kind: "static", limitT: 0.5e-6 }],
    },
    {
      id: "monitor",
      name: "Beam monitor",
      position: [6.45, 3.0, 1.2],
      positionToleranceM: 0.02,
      limits: [{ id: "ac", kind: "alternating", limitT: 0.4e-6, bandHz: [10, 1000] }],
    },
  ],
};
