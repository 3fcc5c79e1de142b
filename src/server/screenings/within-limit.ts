import { Refusal } from "~/domain/errors";

interface Limit {
  limitMs: number;
  /** What the person reads where nobody waited for the answer any more, and where it took too long. */
  givenUp: string;
  tooLong: string;
}

/**
 * Runs work of the worker pool until `signal` is aborted or the time is up, which ends it.
 * @throws Refusal screening.timed-out; service.unavailable once `signal` is aborted; whatever `run` throws
 */
export async function withinLimit<Outcome>(
  run: (ending: AbortSignal) => Promise<Outcome>,
  signal: AbortSignal | undefined,
  { limitMs, givenUp, tooLong }: Limit,
): Promise<Outcome> {
  const limit = AbortSignal.timeout(limitMs);
  try {
    return await run(signal === undefined ? limit : AbortSignal.any([signal, limit]));
  } catch (error) {
    if (signal?.aborted) throw new Refusal("service.unavailable", givenUp);
    if (limit.aborted) throw new Refusal("screening.timed-out", tooLong);
    throw error;
  }
}
