import * as z from "zod";
import { direction, fieldT, identifier, lengthM, name, percent, point, shieldingFactor } from "./quantities";
import { singleSupply } from "./supply";

const common = {
  id: identifier,
  name,
  source: identifier.nullable().default(null),
  centre: point,
  tolerancePercent: percent.default(0),
  shieldingFactor: shieldingFactor.default(1),
};

const turns = z.int().min(1).max(10_000);

const coil = z.strictObject({
  ...common,
  kind: z.literal("coil"),
  turns,
  radiusM: lengthM,
  lengthM: z.number().nonnegative().max(1000),
  axis: direction,
  supply: singleSupply,
});

const toroid = z
  .strictObject({
    ...common,
    kind: z.literal("toroid"),
    turns,
    meanRadiusM: lengthM,
    minorRadiusM: lengthM,
    compensated: z.boolean(),
    axis: direction,
    supply: singleSupply,
  })
  .refine((value) => value.minorRadiusM < value.meanRadiusM, {
    path: ["minorRadiusM"],
    message: "the minor radius of a ring is below its mean radius",
  });

const dipole = z.strictObject({
  ...common,
  kind: z.literal("dipole"),
  reading: z.strictObject({ distanceM: lengthM, fieldT: fieldT.max(100) }),
  frequencyHz: z.number().nonnegative().max(1e9),
  direction: direction.nullable(),
});

/** Field sources that are not cables: a coil (right-handed about `axis`), a toroid, or a dipole known by one reading. */
export const equipment = z.discriminatedUnion("kind", [coil, toroid, dipole]);

export type Equipment = z.output<typeof equipment>;
export type EquipmentInput = z.input<typeof equipment>;
export type EquipmentKind = Equipment["kind"];
export type Coil = z.output<typeof coil>;
export type Toroid = z.output<typeof toroid>;
export type Dipole = z.output<typeof dipole>;
