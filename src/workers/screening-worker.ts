import { runSteps } from "~/screening/steps";
import { failure, jobSteps, type Job } from "./jobs";
import type { WorkerResponse } from "./protocol";
import { answerTextJob } from "./text-jobs";
import type { TextAnswer, TextJob } from "./text-protocol";

/** A task of the Node pool. The pool ends the thread to cancel it, so the job runs in one go. */
export default function runTask(job: Job | TextJob): WorkerResponse | TextAnswer {
  if (!("id" in job)) return answerTextJob(job);
  try {
    return runSteps(jobSteps(job), {});
  } catch (error) {
    return failure(job.id, error);
  }
}
