import { JobRunner } from "./job-runner";
import type { WorkerRequest, WorkerResponse } from "./protocol";

/** The part of a dedicated worker's global scope that is used here; the DOM's types do not know it. */
interface WorkerScope {
  postMessage(message: WorkerResponse, transfer: ArrayBuffer[]): void;
  addEventListener(type: "message", listener: (event: MessageEvent<WorkerRequest>) => void): void;
}

const scope = globalThis as unknown as WorkerScope;
const runner = new JobRunner((response, transfer) => scope.postMessage(response, transfer));
scope.addEventListener("message", ({ data }) => runner.receive(data));
