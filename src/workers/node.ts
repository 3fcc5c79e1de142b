import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import type { Clearing, ClearingRequest } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import type { Job } from "./jobs";
import { ScreeningFailedError, type FieldMap, type FieldMapRequest, type WorkerResponse } from "./protocol";
import type { TextAnswer, TextJob } from "./text-protocol";

export interface ScreeningPool {
  /** Rejects with ScreeningFailedError; on abort the thread is ended and an AbortError comes back. */
  screen(document: PlanDocument, signal?: AbortSignal): Promise<ScreeningResult>;
  map(document: PlanDocument, request: FieldMapRequest, signal?: AbortSignal): Promise<FieldMap>;
  clearing(document: PlanDocument, request: ClearingRequest, signal?: AbortSignal): Promise<Clearing>;
  /** Has a document's text read and worked on in the thread. Rejects on abort only; the answer says what was refused. */
  text(job: TextJob, signal?: AbortSignal): Promise<TextAnswer>;
  close(): Promise<void>;
}

export interface ScreeningPoolOptions {
  /** Threads at most; without it one a processor. */
  maxThreads?: number;
}

/** A pool of threads that run `workerFile` (the bundled `screening-worker.mjs`). */
export function createScreeningPool(
  workerFile: URL | string,
  { maxThreads }: ScreeningPoolOptions = {},
): ScreeningPool {
  const pool = new Piscina<Job | TextJob, WorkerResponse | TextAnswer>({
    filename: typeof workerFile === "string" ? workerFile : fileURLToPath(workerFile),
    minThreads: 1,
    ...(maxThreads ? { maxThreads } : {}),
  });
  const run = async (job: Job, signal: AbortSignal | undefined): Promise<WorkerResponse> => {
    const response = (await pool.run(job, signal ? { signal } : {})) as WorkerResponse;
    if (response.type === "failed") throw new ScreeningFailedError(response.message, response.faults);
    return response;
  };
  return {
    async screen(document, signal) {
      const response = await run({ type: "screen", id: 0, document }, signal);
      if (response.type !== "screened") throw new ScreeningFailedError("the worker answered something else");
      return response.result;
    },
    async map(document, request, signal) {
      const response = await run({ type: "map", id: 0, document, request }, signal);
      if (response.type !== "mapped") throw new ScreeningFailedError("the worker answered something else");
      return response.map;
    },
    async clearing(document, request, signal) {
      const response = await run({ type: "clearing", id: 0, document, request }, signal);
      if (response.type !== "cleared") throw new ScreeningFailedError("the worker answered something else");
      return response.clearing;
    },
    text: async (job, signal) => (await pool.run(job, signal ? { signal } : {})) as TextAnswer,
    close: () => pool.close(),
  };
}
