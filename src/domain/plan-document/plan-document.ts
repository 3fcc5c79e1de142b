import * as z from "zod";
import { circuit, route } from "./circuit";
import { drawing } from "./drawing";
import { earthField } from "./earth-field";
import { equipment } from "./equipment";
import { loadFaults } from "./load";
import { finite, identifier, magnitude, name } from "./quantities";
import { referenceFaults } from "./references";
import { sensor } from "./sensor";

export const MAX_CIRCUITS = 5000;
export const MAX_SENSORS = 5000;
export const MAX_LOAD_CASES = 100;

export const loadCase = z.strictObject({
  id: identifier,
  name,
  factors: z.record(identifier, magnitude.min(-1e6).max(1e6)).default({}),
});

/** The plan document: all that a screening needs. Metres, degrees, amperes (rms for AC), tesla. */
export const planDocumentSchema = z
  .strictObject({
    format: z.literal("stillneedle-plan"),
    version: z.literal(1),
    name,
    frame: z.strictObject({ northBearingDeg: finite.min(-3600).max(3600) }),
    earthField: earthField.nullable().default(null),
    unknownPhase: z.enum(["worst-case", "typical"]).default("worst-case"),
    routes: z.array(route).max(MAX_CIRCUITS, `at most ${MAX_CIRCUITS} routes`).default([]),
    circuits: z.array(circuit).max(MAX_CIRCUITS, `at most ${MAX_CIRCUITS} circuits`),
    equipment: z
      .array(equipment)
      .max(MAX_CIRCUITS, `at most ${MAX_CIRCUITS} pieces of equipment`)
      .default([]),
    loadCases: z.array(loadCase).max(MAX_LOAD_CASES, `at most ${MAX_LOAD_CASES} load cases`).default([]),
    sensors: z.array(sensor).max(MAX_SENSORS, `at most ${MAX_SENSORS} sensors`),
    drawing: drawing.default({}),
  })
  .superRefine((document, context) => {
    for (const { path, message } of [...referenceFaults(document), ...loadFaults(document)]) {
      context.addIssue({ code: "custom", path, message });
    }
  });

/** A valid document with its defaults filled in; `null` in a circuit's source, tolerances and stray bound means "by rule". */
export type PlanDocument = z.output<typeof planDocumentSchema>;
/** A document as written, keys with defaults left out or not. */
export type PlanDocumentInput = z.input<typeof planDocumentSchema>;
export type LoadCase = z.output<typeof loadCase>;

export function emptyPlanDocument(planName: string): PlanDocument {
  return {
    format: "stillneedle-plan",
    version: 1,
    name: planName,
    frame: { northBearingDeg: 0 },
    earthField: null,
    unknownPhase: "worst-case",
    routes: [],
    circuits: [],
    equipment: [],
    loadCases: [],
    sensors: [],
    drawing: {},
  };
}
