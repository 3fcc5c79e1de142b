import { clientOver, type ScreeningClient, type WorkerPort } from "./client";
import { ScreeningFailedError } from "./protocol";

export type { ScreeningClient } from "./client";

/** Starts a screening worker of the page's own. Results computed here guide the eye; they are never stored. */
export function createScreeningClient(): ScreeningClient {
  return clientOver(
    portOf(new Worker(new URL("./screening-browser-worker.ts", import.meta.url), { type: "module" })),
  );
}

function portOf(worker: Worker): WorkerPort {
  return {
    post: (request) => worker.postMessage(request),
    onResponse: (listener) => worker.addEventListener("message", ({ data }) => listener(data)),
    onFailure: (listener) => {
      worker.addEventListener("error", ({ message }) =>
        listener(new ScreeningFailedError(message || "the worker failed")),
      );
      worker.addEventListener("messageerror", () =>
        listener(new ScreeningFailedError("an answer could not be read")),
      );
    },
    close: () => worker.terminate(),
  };
}
