import { clearingSteps } from "~/screening/clearing/clearing";
import { fieldMapSteps } from "~/screening/field-map";
import { RefusedDocumentError } from "~/screening/refusal";
import { screenSteps } from "~/screening/screen";
import type { Steps } from "~/screening/steps";
import type { WorkerRequest, WorkerResponse } from "./protocol";

export type Job = Exclude<WorkerRequest, { type: "cancel" }>;

/** A job in steps; its outcome is its last answer. Failures are thrown and made an answer by `failure`. `screening` screens a document. */
export function* jobSteps(job: Job, screening: typeof screenSteps = screenSteps): Steps<WorkerResponse> {
  const { id } = job;
  switch (job.type) {
    case "screen":
      return { type: "screened", id, result: yield* screening(job.document) };
    case "map":
      return { type: "mapped", id, map: yield* fieldMapSteps(job.document, job.request) };
    case "clearing":
      return { type: "cleared", id, clearing: yield* clearingSteps(job.document, job.request) };
  }
}

export function failure(id: number, error: unknown): WorkerResponse {
  const faults = error instanceof RefusedDocumentError ? error.faults : [];
  return { type: "failed", id, message: error instanceof Error ? error.message : String(error), faults };
}
