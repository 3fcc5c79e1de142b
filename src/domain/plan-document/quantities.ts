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
export const lengthM = z.number().positive().max(COORDINATE_LIMIT_M, "lengths are at most 100 km");
export const toleranceM = z.number().nonnegative().max(COORDINATE_LIMIT_M, "lengths are at most 100 km");
export const signedCurrentA = z
  .number()
  .min(-CURRENT_LIMIT_A, "currents lie within ±1 MA")
  .max(CURRENT_LIMIT_A, "currents lie within ±1 MA");
export const rmsCurrentA = z
  .number()
  .nonnegative("an rms current has no sign; turn it with phaseDeg: 180")
  .max(CURRENT_LIMIT_A, "currents lie within ±1 MA");
export const percent = z.number().nonnegative().max(1000);
export const frequencyHz = z.number().positive().max(1e9);

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
