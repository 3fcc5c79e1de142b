import * as z from "zod";
import { angleDeg, coordinateM, lengthM, magnitude } from "./quantities";

/** A permutation of the phases over the slots a, b, c: "bca" puts b in a's slot. */
export const phaseOrder = z.enum(["abc", "acb", "bac", "bca", "cab", "cba"]);
export const carrier = z.enum(["go", "return", "a", "b", "c", "n"]);

const rollDeg = angleDeg.default(0);
const sets = { sets: z.int().min(1).max(100), pitchM: lengthM };

/** Copies of an arrangement without phases, side by side along u before the turn, each carrying 1/sets. */
const parallel = z.strictObject(sets).nullable().default(null);

/** Copies of a three-phase arrangement; without `phaseOrders` all stand as "abc". */
const phasedParallel = z
  .strictObject({ ...sets, phaseOrders: z.array(phaseOrder).nullable().default(null) })
  .superRefine((value, context) => {
    if (value.phaseOrders && value.phaseOrders.length !== value.sets) {
      const message = `${value.sets} sets need ${value.sets} phase orders, ${value.phaseOrders.length} given`;
      context.addIssue({ code: "custom", path: ["phaseOrders"], message });
    }
  })
  .nullable()
  .default(null);

const plain = { rollDeg, parallel };
const phased = { spacingM: lengthM, rollDeg, parallel: phasedParallel };

const customConductor = z.strictObject({
  offsetM: z.tuple([coordinateM, coordinateM]),
  of: carrier,
  fraction: magnitude.min(0).max(1),
});

/**
 * How the conductors of a circuit lie in its section. Offsets (p, q) are along u (right of the path) and v (up),
 * metres, before the turn `rollDeg`; `spacingM` is axis to axis.
 */
export const arrangement = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("single"), ...plain }),
  z.strictObject({ kind: z.literal("pair"), spacingM: lengthM, ...plain }),
  z.strictObject({ kind: z.literal("twisted-pair"), spacingM: lengthM, layM: lengthM, ...plain }),
  z.strictObject({ kind: z.literal("flat"), ...phased }),
  z.strictObject({ kind: z.literal("trefoil"), ...phased }),
  z.strictObject({ kind: z.literal("quad"), ...phased }),
  z.strictObject({ kind: z.literal("flat-n"), ...phased }),
  z.strictObject({
    kind: z.literal("custom"),
    conductors: z.array(customConductor).min(1).max(200),
    rollDeg,
  }),
]);

export type Arrangement = z.output<typeof arrangement>;
export type ArrangementInput = z.input<typeof arrangement>;
export type ArrangementKind = Arrangement["kind"];
export type PhaseOrder = z.output<typeof phaseOrder>;
export type Carrier = z.output<typeof carrier>;
