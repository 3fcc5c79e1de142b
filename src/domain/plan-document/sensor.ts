import * as z from "zod";
import { direction, fieldT, frequencyHz, identifier, name, point, toleranceM } from "./quantities";

const limitId = identifier.optional();
const limitT = z
  .number()
  .positive("a limit is above nought")
  .min(1e-18, "a limit is at least 1 aT, aT/m or 1e-18°")
  .max(1e6);

const bandHz = z
  .tuple([z.number().nonnegative(), z.number().positive()])
  .refine(([lowHz, highHz]) => lowHz <= highHz, "a band runs from its lower to its upper frequency");

/** What a sensor tolerates; the quantity compared is fixed by `kind`. Without `id` a limit is called by its place: "1", "2", … */
export const limit = z.discriminatedUnion("kind", [
  z.strictObject({ id: limitId, kind: z.literal("static"), limitT }),
  z.strictObject({
    id: limitId,
    kind: z.literal("alternating"),
    limitT,
    bandHz,
    measure: z.enum(["rms", "peakToPeak"]).default("rms"),
  }),
  z.strictObject({ id: limitId, kind: z.literal("swing"), limitT }),
  z.strictObject({ id: limitId, kind: z.literal("heading"), limitDeg: limitT.max(180) }),
  z.strictObject({ id: limitId, kind: z.literal("gradient"), limitTPerM: limitT }),
  z.strictObject({ id: limitId, kind: z.literal("range"), limitT }),
]);

const fieldComponentT = z
  .number()
  .min(-1000, "fields are at most 1000 T")
  .max(1000, "fields are at most 1000 T");

const background = z.strictObject({
  staticT: z
    .union([z.tuple([fieldComponentT, fieldComponentT, fieldComponentT]), fieldT])
    .nullable()
    .default(null),
  alternating: z
    .array(z.strictObject({ frequencyHz, rmsT: fieldT }))
    .max(100, "at most 100 frequencies")
    .default([]),
  expandedUncertaintyT: fieldT.default(0),
  note: z.string().max(2000).default(""),
});

export const sensor = z
  .strictObject({
    id: identifier,
    name,
    position: point,
    axis: direction.nullable().default(null),
    positionToleranceM: toleranceM.default(0),
    background: background.nullable().default(null),
    limits: z
      .array(limit)
      .min(1, "a sensor has at least one limit")
      .max(50, "at most 50 limits")
      .transform((limits) => limits.map((entry, index) => ({ ...entry, id: entry.id ?? String(index + 1) }))),
  })
  .superRefine((value, context) => {
    value.limits.forEach(({ id }, index) => {
      if (value.limits.findIndex((other) => other.id === id) < index) {
        context.addIssue({
          code: "custom",
          path: ["limits", index, "id"],
          message: `the id "${id}" is used twice`,
        });
      }
    });
  });

export type Sensor = z.output<typeof sensor>;
export type SensorInput = z.input<typeof sensor>;
export type Limit = Sensor["limits"][number];
export type LimitInput = z.input<typeof limit>;
export type LimitKind = Limit["kind"];
export type Background = z.output<typeof background>;

/** The bound of a limit in its own unit: T, degrees or T/m. */
export function limitValue(entry: Limit): number {
  if (entry.kind === "heading") return entry.limitDeg;
  return entry.kind === "gradient" ? entry.limitTPerM : entry.limitT;
}
