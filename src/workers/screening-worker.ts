import { runSteps } from "~/screening/steps";
import { failure, jobSteps, type Job } from "./jobs";
import type { WorkerResponse } from "./protocol";

/** A task of the Node pool. The pool ends the thread to cancel it, so the job runs in one go. */
export default function runTask(job: Job): WorkerResponse {
  try {
    return runSteps(jobSteps(job), {});
  } catch (error) {
    return failure(job.id, error);
  }
}
