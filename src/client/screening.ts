import type { Clearing, ClearingRequest } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import { createScreeningClient, type ScreeningClient } from "~/workers/browser";
import { ScreeningFailedError, type FieldMap, type FieldMapRequest } from "~/workers/protocol";
import { Latest } from "./latest";

export type { FieldMap, FieldMapRequest } from "~/workers/protocol";

export type Outcome<T> =
  | { kind: "done"; value: T }
  | { kind: "refused"; message: string; faults: readonly { path: string; message: string }[] };

async function settled<T>(promise: Promise<T>): Promise<Outcome<T>> {
  try {
    return { kind: "done", value: await promise };
  } catch (failed) {
    if (!(failed instanceof ScreeningFailedError)) throw failed;
    return { kind: "refused", message: failed.message, faults: failed.faults };
  }
}

/** What would clear flagged sensors, worked out in a worker of its own that ends with the answer or the signal. */
export async function askClearing(
  document: PlanDocument,
  request: ClearingRequest,
  signal: AbortSignal,
): Promise<Outcome<Clearing>> {
  const client = createScreeningClient();
  try {
    return await settled(client.clearing(document, request, signal));
  } finally {
    client.dispose();
  }
}

interface Listeners {
  onResult: (document: PlanDocument, outcome: Outcome<ScreeningResult>) => void;
  onMap: (request: FieldMapRequest, outcome: Outcome<FieldMap>) => void;
  /** As `onMap`, for the map that stands upright in the section. */
  onSection: (request: FieldMapRequest, outcome: Outcome<FieldMap>) => void;
}

interface MapTask {
  document: PlanDocument;
  map: FieldMapRequest;
}

/**
 * Screens the newest document and maps the newest request in workers of their own, so that a map never holds up the
 * ledger. What is asked for while one runs waits, and of those that wait only the newest counts.
 */
export class LiveScreening {
  private readonly ledger: ScreeningClient = createScreeningClient();
  private readonly mapper: ScreeningClient = createScreeningClient();
  private readonly documents: Latest<PlanDocument>;
  private readonly maps: Latest<MapTask>;
  private readonly sections: Latest<MapTask>;
  private disposed = false;

  constructor(listeners: Listeners) {
    this.documents = new Latest(async (document) => {
      const outcome = await settled(this.ledger.screen(document));
      if (!this.disposed) listeners.onResult(document, outcome);
    });
    const mapping = (tell: Listeners["onMap"]) =>
      new Latest<MapTask>(async ({ document, map }) => {
        const outcome = await settled(this.mapper.map(document, map));
        if (!this.disposed) tell(map, outcome);
      });
    this.maps = mapping(listeners.onMap);
    this.sections = mapping(listeners.onSection);
  }

  screen(document: PlanDocument): void {
    this.documents.ask(document);
  }

  map(document: PlanDocument, map: FieldMapRequest): void {
    this.maps.ask({ document, map });
  }

  section(document: PlanDocument, map: FieldMapRequest): void {
    this.sections.ask({ document, map });
  }

  dispose(): void {
    this.disposed = true;
    this.ledger.dispose();
    this.mapper.dispose();
  }
}
