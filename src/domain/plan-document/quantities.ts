import * as z from "zod";

/** Half-width of the world a plan may draw in, metres. */
export const COORDINATE_LIMIT_M = 100_000;
/** Largest current a plan may carry, amperes. */
export const CURRENT_LIMIT_A = 1_000_000;

export const finite = z.number();
export const coordinateM = z
  .number()
  .min(-COORDINATE_LIMIT_M, "coordinates lie within ±100 km")
  .max(COORDINATE_LIMIT_M, "coordinates lie within ±100 km");
export const lengthM = z
  .number()
  .positive()
  .min(1e-6, "lengths are at least 1 µm")
  .max(COORDINATE_LIMIT_M, "lengths are at most 100 km");
export const toleranceM = z.number().nonnegative().max(COORDINATE_LIMIT_M, "lengths are at most 100 km");
/** What is smaller is nought: products of it leave the range in which squares can be told from nought, and rounding leaves such. */
const LEAST = 1e-15;
const LEAST_FIELD_T = 1e-24;
const noughtBelow = (least: number) => (value: number) => (Math.abs(value) < least ? 0 : value);

/** A factor, share or current. */
export const magnitude = z.number().overwrite(noughtBelow(LEAST));
export const signedCurrentA = magnitude
  .min(-CURRENT_LIMIT_A, "currents lie within ±1 MA")
  .max(CURRENT_LIMIT_A, "currents lie within ±1 MA");
export const rmsCurrentA = magnitude
  .nonnegative("an rms current has no sign; turn it with phaseDeg: 180")
  .max(CURRENT_LIMIT_A, "currents lie within ±1 MA");
export const percent = magnitude.nonnegative().max(1000);
export const shieldingFactor = magnitude.nonnegative().max(1000);
export const frequencyHz = z
  .number()
  .positive()
  .min(1e-6, "frequencies are at least 1 µHz")
  .max(1e9, "frequencies are at most 1 GHz");
export const angleDeg = z
  .number()
  .min(-1e6, "angles lie within ±1 000 000°")
  .max(1e6, "angles lie within ±1 000 000°");
/** Magnitude of a flux density, tesla. */
export const fieldT = z
  .number()
  .overwrite(noughtBelow(LEAST_FIELD_T))
  .nonnegative()
  .max(1000, "fields are at most 1000 T");

/** [x, y, z] in the plan frame, metres. */
export const point = z.tuple([coordinateM, coordinateM, coordinateM]);
/** [x, y] in the plan frame, metres. */
export const planPoint = z.tuple([coordinateM, coordinateM]);
/** A direction of any length but nought. */
export const direction = z
  .tuple([finite, finite, finite])
  .refine(
    (axis) => Math.hypot(...axis) > 1e-12 && Math.hypot(...axis) < 1e12,
    "a direction has a length above nought",
  );

export const identifier = z
  .string()
  .min(1)
  .max(100)
  .refine((id) => id !== "__proto__", "this id is reserved");
export const name = z.string().max(300);

export type Point = z.output<typeof point>;
export type PlanPoint = z.output<typeof planPoint>;
