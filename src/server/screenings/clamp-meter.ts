import { z } from "zod";
import { clampMeterRequest } from "~/domain/clamp-meter";
import type { ClampReading } from "~/workers/text-protocol";
import type { PlanRow } from "../db/queries/plans";
import { clampMeterInPool } from "./run-screening";
import { savedDocumentText } from "./saved-document";

/**
 * The loop is read in a plan's saved working copy, at the version that the person has before them: a loop is drawn in a plan, is
 * as small as the document is large, and its reading is compared on site with what that plan says.
 */
export const clampMeterInput = clampMeterRequest.extend({ version: z.int().min(1) });

/**
 * @param signal aborted when nobody waits for the answer any more
 * @throws Refusal state.conflict where the working copy has moved on; document.refused with faults, those of the loop among
 * them; screening.timed-out
 */
export async function clampMeterReadingOf(
  plan: PlanRow,
  { version, ...request }: z.output<typeof clampMeterInput>,
  signal?: AbortSignal,
): Promise<ClampReading> {
  return clampMeterInPool(await savedDocumentText(plan, version), request, signal);
}
