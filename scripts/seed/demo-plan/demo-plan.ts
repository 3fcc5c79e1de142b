import type { EarthField } from "../../../src/domain/plan-document/earth-field";
import type { PlanDocumentInput } from "../../../src/domain/plan-document/plan-document";
import { acCircuits } from "./circuits-ac";
import { dcCircuits } from "./circuits-dc";
import { equipment } from "./equipment";
import { floorSheet } from "./floor-image";
import { loadCases } from "./load-cases";
import { routes } from "./routes";
import { sensors } from "./sensors";

export const demoPlanName = "Level 1, instrument hall";

/** The demo's plan on its drawing. Everything in it lies where the floor plan shows it. */
export function demoPlan(drawing: { id: string }, earthField: EarthField | null): PlanDocumentInput {
  return {
    format: "stillneedle-plan",
    version: 1,
    name: demoPlanName,
    frame: { northBearingDeg: 12.5 },
    earthField,
    routes,
    circuits: [...dcCircuits, ...acCircuits],
    equipment,
    loadCases,
    sensors,
    drawing: {
      sheet: { drawingId: drawing.id, ...floorSheet },
      scale: { a: [0, 0], b: [48, 0], knownLengthM: 48 },
      gridM: 0.5,
      datum: {
        name: "Brass stud",
        position: [0, 0, 0],
        description:
          "In the floor at the corner of axes A and 1; heights from the finished floor of level 1.",
      },
      marks: [
        { id: "column-g2", name: "Column G2", position: [36, 6, 0] },
        { id: "column-b5", name: "Column B5", position: [6, 24, 0] },
        { id: "column-f5", name: "Column F5", position: [30, 24, 0] },
      ],
      levels: [
        { id: "floor", name: "Finished floor", heightM: 0 },
        { id: "compass", name: "Vehicle compass", heightM: 0.85 },
        { id: "tray-t1", name: "Tray T1", heightM: 3.2 },
        { id: "tray-t2", name: "Tray T2", heightM: 3.6 },
      ],
      zones: [
        {
          id: "test-bay",
          name: "Navigation test bay",
          outline: [
            [26.1, 0.4],
            [47.6, 0.4],
            [47.6, 13.9],
            [26.1, 13.9],
          ],
        },
      ],
      sectionLines: [
        { id: "docks", name: "Along the docks", a: [26, 2], b: [46, 2] },
        { id: "benches", name: "Along the benches", a: [14, 26.1], b: [44, 26.1] },
      ],
      notes: [
        {
          id: "neutral",
          at: [37.5, 28.4],
          text: "Neutral earthed a second time at bench D: 1.4 A net measured on tray T2, 11 September 2026.",
        },
      ],
    },
  };
}
