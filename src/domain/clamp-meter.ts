import * as z from "zod";
import { point } from "./plan-document/quantities";

/** A clamp-meter loop and the load case that it is read in; without one the first, or what is entered where there is none. */
export const clampMeterRequest = z.strictObject({
  /** Corners of a closed polygon in plan axes, metres; currents count positive along its right-hand normal. */
  loop: z
    .array(point)
    .min(3, "A loop has at least three corners.")
    .max(1000, "A loop has at most 1000 corners."),
  loadCaseId: z.string().max(100).nullable().default(null),
});

export type ClampMeterRequest = z.output<typeof clampMeterRequest>;
