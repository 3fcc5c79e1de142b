import { ApiRefusal, NoConnection } from "./api";

/** What the other person's save left on the server. */
export interface TheirSave<D> {
  version: number;
  document: D;
  savedByName: string;
  savedAt: string;
}

export type SaveState<D> =
  | { kind: "saved"; at: Date }
  | { kind: "waiting" }
  | { kind: "saving" }
  | { kind: "no-connection" }
  | { kind: "conflict"; theirs: TheirSave<D> }
  | { kind: "refused"; message: string; faults: readonly { path: string; message: string }[] }
  | { kind: "signed-out" };

export type PutOutcome<D> =
  { kind: "saved"; version: number; savedAt: string } | { kind: "conflict"; theirs: TheirSave<D> };

export interface AutosavePorts<D> {
  /** Puts the document on top of `baseVersion`. Throws ApiRefusal or NoConnection. */
  put: (baseVersion: number, document: D) => Promise<PutOutcome<D>>;
  /** Called with each new state. */
  onState: (state: SaveState<D>) => void;
  /** Called when the server has taken `document` as `version`. */
  onSaved: (document: D, version: number) => void;
  /** Calls back after `delayMs` unless cancelled. */
  later: (callBack: () => void, delayMs: number) => () => void;
}

/** How long typing and dragging have to rest before a save starts. */
export const restMs = 800;

const retryMs = [2_000, 5_000, 15_000, 30_000] as const;

/**
 * Saves the newest document, one save at a time: what is edited while a save runs waits for its answer.
 * A conflict or a refusal stops saving until `rebase` or the next edit.
 */
export class Autosave<D> {
  private version: number;
  private newest: D;
  private savedDocument: D;
  private state: SaveState<D>;
  private running: Promise<void> | null = null;
  private cancelTimer: (() => void) | null = null;
  private failures = 0;

  constructor(
    private readonly ports: AutosavePorts<D>,
    saved: { version: number; document: D; at: Date },
  ) {
    this.version = saved.version;
    this.newest = saved.document;
    this.savedDocument = saved.document;
    this.state = { kind: "saved", at: saved.at };
  }

  get unsaved(): boolean {
    return this.newest !== this.savedDocument;
  }

  get baseVersion(): number {
    return this.version;
  }

  get base(): D {
    return this.savedDocument;
  }

  edited(document: D): void {
    this.newest = document;
    if (this.state.kind === "conflict" || this.running !== null) return;
    if (this.unsaved) {
      if (this.state.kind !== "no-connection") this.become({ kind: "waiting" });
      this.schedule(restMs);
    }
  }

  /** Goes on from what the other person saved, with the document in which both are merged. */
  rebase(theirs: { version: number; document: D; savedAt: string }, merged: D): void {
    this.version = theirs.version;
    this.savedDocument = theirs.document;
    this.newest = merged;
    if (this.unsaved) {
      this.become({ kind: "waiting" });
      this.schedule(0);
    } else {
      this.become({ kind: "saved", at: new Date(theirs.savedAt) });
    }
  }

  /** Tries at once, when the network is back or the person asks. */
  retry(): void {
    if (this.unsaved && this.running === null && this.state.kind !== "conflict") this.schedule(0);
  }

  /** Saves all that is edited. @returns the version that holds it, or null when it could not be saved. */
  async flush(): Promise<number | null> {
    this.cancelTimer?.();
    while (this.running !== null) await this.running;
    while (this.unsaved && this.state.kind !== "conflict") {
      await this.save();
      if (this.state.kind !== "saved" && this.state.kind !== "waiting") break;
    }
    return this.unsaved ? null : this.version;
  }

  stop(): void {
    this.cancelTimer?.();
    this.cancelTimer = null;
  }

  private become(state: SaveState<D>): void {
    this.state = state;
    this.ports.onState(state);
  }

  private schedule(delayMs: number): void {
    this.cancelTimer?.();
    this.cancelTimer = this.ports.later(() => {
      this.cancelTimer = null;
      if (this.running === null) void this.save();
    }, delayMs);
  }

  private save(): Promise<void> {
    this.running ??= this.saveOnce().finally(() => {
      this.running = null;
    });
    return this.running;
  }

  private async saveOnce(): Promise<void> {
    this.cancelTimer?.();
    this.cancelTimer = null;
    const document = this.newest;
    this.become({ kind: "saving" });
    try {
      const outcome = await this.ports.put(this.version, document);
      this.failures = 0;
      if (outcome.kind === "conflict") {
        this.become({ kind: "conflict", theirs: outcome.theirs });
        return;
      }
      this.version = outcome.version;
      this.savedDocument = document;
      this.ports.onSaved(document, outcome.version);
      this.become(this.unsaved ? { kind: "waiting" } : { kind: "saved", at: new Date(outcome.savedAt) });
      if (this.unsaved) this.schedule(restMs);
    } catch (failed) {
      this.afterFailure(failed, document);
    }
  }

  private afterFailure(failed: unknown, document: D): void {
    if (failed instanceof ApiRefusal && failed.status === 401) {
      this.become({ kind: "signed-out" });
    } else if (failed instanceof ApiRefusal && failed.status < 500 && failed.status !== 429) {
      this.become({ kind: "refused", message: failed.message, faults: failed.faults });
      if (this.newest !== document) this.schedule(restMs);
    } else if (failed instanceof ApiRefusal || failed instanceof NoConnection) {
      this.become({ kind: "no-connection" });
      this.schedule(retryMs[Math.min(this.failures, retryMs.length - 1)] ?? 0);
      this.failures++;
    } else {
      throw failed;
    }
  }
}
