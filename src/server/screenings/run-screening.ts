import type { ClampMeterRequest } from "~/domain/clamp-meter";
import { type Fault, Refusal } from "~/domain/errors";
import type { ClampReading, ScreenedText, TextAnswer, TextJob } from "~/workers/text-protocol";
import { screeningPool } from "./pool";
import { withinLimit } from "./within-limit";

/** Longest that a screening may take, waiting for a free worker included. */
export const screeningLimitMs = 30_000;

export const refusedDocument = (faults: readonly Fault[]): Refusal =>
  new Refusal(
    "document.refused",
    "The document cannot be screened as it is; each place that is at fault says what to change.",
    { faults },
  );

/**
 * Reads, judges and screens a document's text in the worker pool; the thread that asks only passes it on.
 * @param signal aborted when nobody waits for the answer any more
 * @param limitMs how long it may take
 * @throws Refusal document.refused with faults; request.malformed; screening.timed-out; service.unavailable once `signal` is aborted
 */
export async function runScreening(
  text: string,
  signal?: AbortSignal,
  limitMs = screeningLimitMs,
): Promise<ScreenedText> {
  const answer = await inPool({ type: "screen-text", text }, signal, limitMs);
  if (answer.type === "screened") return answer.screened;
  throw refusalFor(answer);
}

/** The reading to expect around a loop, worked out in the pool like a screening. @throws Refusal as `runScreening` does */
export async function clampMeterInPool(
  text: string,
  request: ClampMeterRequest,
  signal?: AbortSignal,
): Promise<ClampReading> {
  const answer = await inPool({ type: "clamp-meter-text", text, request }, signal, screeningLimitMs);
  if (answer.type === "clamped") return answer.reading;
  throw refusalFor(answer);
}

function refusalFor(answer: TextAnswer): Error {
  if (answer.type === "refused") return refusedDocument(answer.faults);
  if (answer.type === "not-json")
    return new Refusal(
      "request.malformed",
      `The document is not valid JSON: ${answer.reason}. Check it and send it again.`,
    );
  return new Error(
    answer.type === "failed"
      ? `The screening failed: ${answer.message}`
      : "The worker answered something else.",
  );
}

const inPool = (job: TextJob, signal: AbortSignal | undefined, limitMs: number): Promise<TextAnswer> =>
  withinLimit((ending) => screeningPool().text(job, ending), signal, {
    limitMs,
    givenUp: "The request was given up before the screening was finished. Nothing was stored.",
    tooLong: `The screening took longer than ${String(limitMs / 1000)} s and was stopped; nothing was stored. Screen fewer sensors at a time, or draw paths with fewer points.`,
  });
