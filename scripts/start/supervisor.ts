import { describeExit, type ManagedProcess } from "../services/managed-process";
import type { ProcessFile } from "./process-file";
import { StartFailure } from "./start-failure";

interface Supervised {
  process: ManagedProcess;
  stop: () => Promise<unknown>;
}

/** Keeps the processes of a run together: started one after the other, stopped the other way round. */
export class Supervisor {
  private readonly running: Supervised[] = [];
  private stopping: Promise<void> | undefined;
  private fail: (failure: StartFailure) => void = () => {};

  /** Rejects when a process ends that should not. */
  readonly died = new Promise<never>((_resolve, reject) => {
    this.fail = reject;
  });

  constructor(private readonly processFile?: ProcessFile) {
    // Whoever waits hears of it; until somebody does, it must not end the process.
    this.died.catch(() => {});
  }

  watch(process: ManagedProcess, mark: string, stop: () => Promise<unknown> = () => process.stop()): void {
    this.running.push({ process, stop });
    if (process.pid !== undefined) this.processFile?.add({ pid: process.pid, mark });
    void process.exited.then((exit) => {
      if (this.stopping) return;
      this.fail(
        new StartFailure(
          "process-died",
          `${capitalised(process.name)} ended (${describeExit(exit)}), so everything is stopped. It last said:\n` +
            `${process.output.trim().split("\n").slice(-15).join("\n")}\n` +
            `Mend what it says and run "npm start" again; the data is kept.`,
        ),
      );
    });
  }

  stop(): Promise<void> {
    this.stopping ??= (async () => {
      for (const { stop } of [...this.running].reverse()) await stop();
      this.processFile?.release();
    })();
    return this.stopping;
  }
}

const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
