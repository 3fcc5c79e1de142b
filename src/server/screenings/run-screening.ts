import { type Fault, Refusal } from "~/domain/errors";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { resultText } from "~/domain/result-text";
import type { ScreeningResult } from "~/domain/screening-result";
import { ScreeningFailedError } from "~/workers/protocol";
import { screeningPool } from "./pool";

/** Longest that a screening may take, waiting for a free worker included. */
export const screeningLimitMs = 30_000;

export const refusedDocument = (faults: readonly Fault[]): Refusal =>
  new Refusal(
    "document.refused",
    "The document cannot be screened as it is; each place that is at fault says what to change.",
    { faults },
  );

/**
 * Screens a valid document in the worker pool.
 * @param signal aborted when nobody waits for the answer any more
 * @param limitMs how long it may take
 * @throws Refusal document.refused with faults; screening.timed-out; service.unavailable once `signal` is aborted
 */
export async function runScreening(
  document: PlanDocument,
  signal?: AbortSignal,
  limitMs = screeningLimitMs,
): Promise<{ result: ScreeningResult; text: string }> {
  const limit = AbortSignal.timeout(limitMs);
  try {
    const ending = signal === undefined ? limit : AbortSignal.any([signal, limit]);
    const result = await screeningPool().screen(document, ending);
    return { result, text: resultText(result) };
  } catch (error) {
    if (error instanceof ScreeningFailedError && error.faults.length > 0) throw refusedDocument(error.faults);
    if (signal?.aborted)
      throw new Refusal(
        "service.unavailable",
        "The request was given up before the screening was finished. Nothing was stored.",
      );
    if (limit.aborted)
      throw new Refusal(
        "screening.timed-out",
        `The screening took longer than ${String(limitMs / 1000)} s and was stopped; nothing was stored. Screen fewer sensors at a time, or draw paths with fewer points.`,
      );
    throw error;
  }
}
