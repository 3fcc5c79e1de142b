import { screeningResultSchema, verdictSchema } from "../screening-result";
import { madeAnswer } from "./common";

export const screenedAnswer = madeAnswer.extend({ verdict: verdictSchema });

/** A result byte for byte as the engine printed it. */
export const resultAnswer = screeningResultSchema.meta({ id: "ScreeningResult" });
