import * as z from "zod";
import { clearingSchema } from "../clearing";
import { screeningResultSchema, verdictSchema } from "../screening-result";
import { madeAnswer } from "./common";

export const screenedAnswer = madeAnswer.extend({ verdict: verdictSchema });

/** A result byte for byte as the engine printed it. */
export const resultAnswer = screeningResultSchema.meta({ id: "ScreeningResult" });

/** A circuit or route in the form of the plan document, which has its own schema. */
const replaced = z.array(z.looseObject({ id: z.string() }));
const change = clearingSchema.shape.changes.element.extend({
  patch: z.object({ circuits: replaced, routes: replaced }),
});

/** What would clear the flagged positions of a screening. */
export const clearingAnswer = clearingSchema.extend({ changes: z.array(change) }).meta({ id: "Clearing" });
