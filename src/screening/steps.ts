export interface Progress {
  done: number;
  total: number;
}

/** Work that can pause: yields its progress, returns its outcome. */
export type Steps<Outcome> = Generator<Progress, Outcome, void>;

export interface ScreenOptions {
  /** Looked at between steps; when aborted, the signal's reason is thrown. */
  signal?: AbortSignal;
  /** Called between steps with how many of how many are done. */
  onProgress?: (done: number, total: number) => void;
}

/** Runs steps to their end in one go. */
export function runSteps<Outcome>(steps: Steps<Outcome>, { signal, onProgress }: ScreenOptions): Outcome {
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
    signal?.throwIfAborted();
    onProgress?.(step.value.done, step.value.total);
  }
}
