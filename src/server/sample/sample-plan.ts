import { type PlanDocument, planDocumentSchema } from "~/domain/plan-document/plan-document";

/** What a visitor of the front page may change: the string's current in A and how far apart its two conductors lie in m. */
export interface SampleChoice {
  currentA: number;
  spacingM: number;
}

const trayM = 2.6;
const roomM = { width: 12, depth: 8 };

/** A small test room with a DC string, a three-phase riser and a charger circuit around five sensors. */
export function samplePlan({ currentA, spacingM }: SampleChoice): PlanDocument {
  const circuit = { conductorRadiusM: 0.006, strayCurrentA: 0, positionToleranceM: 0.02 };
  return planDocumentSchema.parse({
    format: "stillneedle-plan",
    version: 1,
    name: "Test room",
    frame: { northBearingDeg: 12.5 },
    circuits: [
      {
        ...circuit,
        id: "string",
        name: "UPS string",
        path: [
          [0.4, 1, trayM],
          [8.6, 1, trayM],
          [8.6, 4.4, trayM],
        ],
        arrangement: { kind: "pair", spacingM },
        supply: { kind: "dc", currentA },
      },
      {
        ...circuit,
        id: "riser",
        name: "Riser",
        path: [
          [11.4, 0.6, 0],
          [11.4, 0.6, trayM],
          [11.4, 7.4, trayM],
        ],
        arrangement: { kind: "trefoil", spacingM: 0.034 },
        supply: { kind: "ac3", currentA: 160, frequencyHz: 50 },
      },
      {
        ...circuit,
        id: "charger",
        name: "Charger circuit",
        path: [
          [8.6, 4.4, 0.3],
          [8.6, 7.4, 0.3],
        ],
        arrangement: { kind: "pair", spacingM: 0.014 },
        supply: { kind: "ac1", currentA: 32, frequencyHz: 50, harmonics: [{ order: 3, percent: 30 }] },
      },
    ],
    sensors: [
      sensor("dock-1", "Compass, dock 1", [2.2, 2.4, 1.1], { kind: "static", limitT: 2e-6 }),
      sensor("dock-2", "Compass, dock 2", [5.4, 1.6, 1.1], { kind: "static", limitT: 2e-6 }),
      sensor("pillar", "Fluxgate pillar", [2.4, 6.6, 1.3], { kind: "static", limitT: 5e-8 }),
      sensor("bench", "Hall-probe bench", [6.2, 5.2, 0.9], { kind: "static", limitT: 1e-5 }),
      sensor("microscope", "Scanning microscope", [10, 6.2, 1], {
        kind: "alternating",
        limitT: 1e-6,
        bandHz: [10, 1000],
        measure: "peakToPeak",
      }),
    ],
    drawing: {
      zones: [
        {
          id: "room",
          name: "Test room, tray at 2.60 m",
          outline: [
            [0, 0],
            [roomM.width, 0],
            [roomM.width, roomM.depth],
            [0, roomM.depth],
          ],
        },
      ],
    },
  });
}

const sensor = (id: string, name: string, position: number[], limit: object) => ({
  id,
  name,
  position,
  positionToleranceM: 0.02,
  limits: [limit],
});
