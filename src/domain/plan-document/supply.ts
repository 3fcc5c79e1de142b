import * as z from "zod";
import { angleDeg, frequencyHz, percent, rmsCurrentA, signedCurrentA } from "./quantities";

const harmonic = z.strictObject({ order: z.int().min(2).max(1000), percent, angleDeg: angleDeg.default(0) });

const harmonics = z
  .array(harmonic)
  .max(200, "at most 200 harmonics")
  .default([])
  .superRefine((list, context) => {
    list.forEach(({ order }, index) => {
      if (list.findIndex((other) => other.order === order) < index) {
        context.addIssue({
          code: "custom",
          path: [index, "order"],
          message: `order ${order} is given twice`,
        });
      }
    });
  });

const alternating = { frequencyHz, phaseDeg: angleDeg.default(0), harmonics };
const phase = z.strictObject({ currentA: rmsCurrentA, angleDeg });

const ac3 = z
  .strictObject({
    kind: z.literal("ac3"),
    currentA: rmsCurrentA.optional(),
    phases: z.tuple([phase, phase, phase]).optional(),
    sequence: z.enum(["abc", "acb"]).default("abc"),
    ...alternating,
  })
  .superRefine((supply, context) => {
    if ((supply.currentA === undefined) === (supply.phases === undefined)) {
      const message =
        "a three-phase supply has either currentA (balanced) or phases (one entry each for a, b, c)";
      context.addIssue({ code: "custom", path: ["currentA"], message });
    }
  });

/**
 * What flows: DC in amperes with its sign, AC in rms amperes with angles in degrees, e^{+jωt}.
 * In an unbalanced `ac3` each `phases` entry states that phase's own angle; `phaseDeg` is added to all.
 * `sequence: "acb"` swaps b and c in either form.
 */
export const supply = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("dc"), currentA: signedCurrentA }),
  z.strictObject({ kind: z.literal("ac1"), currentA: rmsCurrentA, ...alternating }),
  ac3,
]);

/** The supply of a coil or toroid: one current. */
export const singleSupply = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("dc"), currentA: signedCurrentA }),
  z.strictObject({ kind: z.literal("ac1"), currentA: rmsCurrentA, ...alternating }),
]);

export type Supply = z.output<typeof supply>;
export type SupplyInput = z.input<typeof supply>;
export type SupplyKind = Supply["kind"];
export type SingleSupply = z.output<typeof singleSupply>;
