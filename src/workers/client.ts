import type { Clearing, ClearingRequest } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import {
  ScreeningFailedError,
  type FieldMap,
  type FieldMapRequest,
  type OnProgress,
  type WorkerRequest,
  type WorkerResponse,
} from "./protocol";

/** The end of a port that a screening worker listens on. */
export interface WorkerPort {
  post(request: WorkerRequest): void;
  onResponse(listener: (response: WorkerResponse) => void): void;
  onFailure(listener: (error: Error) => void): void;
  close(): void;
}

/** Screening, maps and what would clear as promises; they reject with the signal's reason, or with ScreeningFailedError. */
export interface ScreeningClient {
  screen(document: PlanDocument, signal?: AbortSignal, onProgress?: OnProgress): Promise<ScreeningResult>;
  map(
    document: PlanDocument,
    request: FieldMapRequest,
    signal?: AbortSignal,
    onProgress?: OnProgress,
  ): Promise<FieldMap>;
  /** What would clear flagged sensors. */
  clearing(
    document: PlanDocument,
    request: ClearingRequest,
    signal?: AbortSignal,
    onProgress?: OnProgress,
  ): Promise<Clearing>;
  dispose(): void;
}

interface Pending {
  resolve(response: WorkerResponse): void;
  reject(error: unknown): void;
  onProgress: OnProgress | undefined;
}

type Ask =
  | { type: "screen"; document: PlanDocument }
  | { type: "map"; document: PlanDocument; request: FieldMapRequest }
  | { type: "clearing"; document: PlanDocument; request: ClearingRequest };

/** A client that speaks the protocol over a port. */
export function clientOver(port: WorkerPort): ScreeningClient {
  const pending = new Map<number, Pending>();
  let lastId = 0;
  const fail = (error: Error) => {
    for (const { reject } of pending.values()) reject(error);
    pending.clear();
  };
  port.onResponse((response) => {
    const call = pending.get(response.id);
    if (!call) return;
    if (response.type === "progress") {
      call.onProgress?.(response.done, response.total);
      return;
    }
    pending.delete(response.id);
    if (response.type === "failed") call.reject(new ScreeningFailedError(response.message, response.faults));
    else call.resolve(response);
  });
  port.onFailure(fail);

  const ask = (
    request: Ask,
    signal: AbortSignal | undefined,
    onProgress: OnProgress | undefined,
  ): Promise<WorkerResponse> =>
    new Promise((resolve, reject) => {
      if (signal?.aborted) {
        reject(signal.reason);
        return;
      }
      const id = ++lastId;
      const abort = () => {
        pending.delete(id);
        port.post({ type: "cancel", id });
        reject(signal?.reason);
      };
      const settle =
        <T>(then: (value: T) => void) =>
        (value: T) => {
          signal?.removeEventListener("abort", abort);
          then(value);
        };
      pending.set(id, { resolve: settle(resolve), reject: settle(reject), onProgress });
      signal?.addEventListener("abort", abort, { once: true });
      port.post({ ...request, id });
    });

  return {
    async screen(document, signal, onProgress) {
      const response = await ask({ type: "screen", document }, signal, onProgress);
      if (response.type !== "screened") throw new ScreeningFailedError("the worker answered something else");
      return response.result;
    },
    async map(document, request, signal, onProgress) {
      const response = await ask({ type: "map", document, request }, signal, onProgress);
      if (response.type !== "mapped") throw new ScreeningFailedError("the worker answered something else");
      return response.map;
    },
    async clearing(document, request, signal, onProgress) {
      const response = await ask({ type: "clearing", document, request }, signal, onProgress);
      if (response.type !== "cleared") throw new ScreeningFailedError("the worker answered something else");
      return response.clearing;
    },
    dispose() {
      fail(new ScreeningFailedError("the screening worker was closed"));
      port.close();
    },
  };
}
