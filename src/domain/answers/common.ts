import * as z from "zod";
import { statusByErrorCode, type ErrorCode } from "../errors";

/** A moment as it stands in JSON: UTC, ISO 8601. */
export const instant = z.iso.datetime();

/** What was made, and the page that shows it. */
export const madeAnswer = z.object({ id: z.uuid(), url: z.string() });

export const errorCode = z.enum(Object.keys(statusByErrorCode) as [ErrorCode, ...ErrorCode[]]);

const faultAnswer = z.object({ path: z.string(), message: z.string() });

/** The body of every refused call; see `ErrorBody`. */
export const errorAnswer = z
  .object({
    error: z.object({
      code: errorCode,
      message: z.string(),
      faults: z.array(faultAnswer).optional(),
      detail: z.record(z.string(), z.unknown()).optional(),
    }),
  })
  .meta({ id: "Refusal" });
