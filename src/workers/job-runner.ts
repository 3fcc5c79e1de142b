import { LiveScreener } from "~/screening/live";
import { failure, jobSteps, type Job } from "./jobs";
import type { WorkerRequest, WorkerResponse } from "./protocol";

/** How long a job runs before the worker looks at its messages, milliseconds. */
const SLICE_MS = 12;

/**
 * Runs jobs one after another in slices, so that a cancel is heard while a job runs. Of a document that differs from the one screened before
 * in its sensors alone, only those that differ are judged. `post` sends an answer; map values are
 * transferred, not copied.
 */
export class JobRunner {
  private readonly waiting: Job[] = [];
  private readonly live = new LiveScreener();
  private readonly cancelled = new Set<number>();
  private running: number | null = null;

  constructor(private readonly post: (response: WorkerResponse, transfer: ArrayBuffer[]) => void) {}

  receive(request: WorkerRequest): void {
    if (request.type !== "cancel") {
      this.waiting.push(request);
      if (this.running === null) void this.work();
      return;
    }
    const index = this.waiting.findIndex(({ id }) => id === request.id);
    if (index >= 0) this.waiting.splice(index, 1);
    else if (this.running === request.id) this.cancelled.add(request.id);
  }

  private async work(): Promise<void> {
    for (let job = this.waiting.shift(); job; job = this.waiting.shift()) {
      this.running = job.id;
      await this.run(job);
      this.cancelled.delete(job.id);
      this.running = null;
    }
  }

  private async run(job: Job): Promise<void> {
    const steps = jobSteps(job, (document) => this.live.steps(document));
    try {
      for (let until = performance.now() + SLICE_MS; ;) {
        const step = steps.next();
        if (step.done) return this.answer(step.value);
        if (performance.now() < until) continue;
        this.post({ type: "progress", id: job.id, ...step.value }, []);
        await messagesHeard();
        if (this.cancelled.has(job.id)) return;
        until = performance.now() + SLICE_MS;
      }
    } catch (error) {
      this.answer(failure(job.id, error));
    }
  }

  private answer(response: WorkerResponse): void {
    const transfer = response.type === "mapped" ? [response.map.values.buffer as ArrayBuffer] : [];
    this.post(response, transfer);
  }
}

/** Lets messages that wait be delivered first: a task of its own, not a microtask. */
function messagesHeard(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, 0));
}
