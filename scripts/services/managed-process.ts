import { spawn, type ChildProcess } from "node:child_process";
import { closeSync, mkdirSync, openSync } from "node:fs";
import { dirname } from "node:path";
import { FileTail, PipeTail, type OutputTail } from "./output-tail";

export interface ProcessRecipe {
  /** What people call it in messages: "the mail fake". */
  name: string;
  command: string;
  args: readonly string[];
  env?: NodeJS.ProcessEnv;
  cwd?: string;
  /** Everything the process prints is appended here; without one it is shown as this process's own output. */
  logFile?: string;
  /**
   * How the process says that it is ready: `message` waits for an IPC message `"ready"` (our own Node
   * processes), a pattern waits for something that it prints.
   */
  readyWhen: "message" | RegExp;
  readyWithinMs?: number;
}

export interface Exit {
  code: number | null;
  signal: NodeJS.Signals | null;
}

export class ProcessFailure extends Error {
  constructor(
    readonly processName: string,
    message: string,
    readonly output: string,
    readonly exit?: Exit,
  ) {
    super(message);
  }
}

/** A child process that has said it is ready, and can be stopped. */
export class ManagedProcess {
  readonly exited: Promise<Exit>;

  private constructor(
    readonly name: string,
    private readonly child: ChildProcess,
    private readonly tail: OutputTail,
  ) {
    this.exited = new Promise((resolve) => {
      child.once("error", () => resolve({ code: 127, signal: null }));
      child.once("close", (code, signal) => resolve({ code, signal }));
    });
  }

  static async start(recipe: ProcessRecipe): Promise<ManagedProcess> {
    const { child, tail } = launch(recipe);
    const managed = new ManagedProcess(recipe.name, child, tail);
    try {
      await managed.becomesReady(recipe.readyWhen, recipe.readyWithinMs ?? 60_000);
    } catch (error) {
      await managed.stop();
      throw error;
    }
    return managed;
  }

  get pid(): number | undefined {
    return this.child.pid;
  }

  /** The last few thousand characters that the process printed. */
  get output(): string {
    return this.tail.read();
  }

  /** SIGTERM, then SIGKILL when it has not ended within `graceMs`. Stopping twice is harmless. */
  async stop(graceMs = 15_000): Promise<Exit> {
    if (this.child.exitCode !== null || this.child.signalCode !== null) return this.exited;
    this.child.kill("SIGTERM");
    const killer = setTimeout(() => this.child.kill("SIGKILL"), graceMs);
    const exit = await this.exited;
    clearTimeout(killer);
    return exit;
  }

  private becomesReady(readyWhen: ProcessRecipe["readyWhen"], withinMs: number): Promise<void> {
    return new Promise((resolve, reject) => {
      const fail = (what: string, exit?: Exit) =>
        reject(new ProcessFailure(this.name, `${this.name} ${what}`, this.output, exit));
      const timer = setTimeout(() => fail(`did not answer within ${withinMs / 1000} s`), withinMs);
      const ready = () => {
        clearTimeout(timer);
        resolve();
      };
      if (readyWhen === "message") {
        this.child.on("message", (message) => {
          if (message === "ready") ready();
        });
      } else {
        for (const stream of [this.child.stdout, this.child.stderr]) {
          stream?.on("data", () => {
            if (readyWhen.test(this.output)) ready();
          });
        }
      }
      void this.exited.then((exit) => {
        clearTimeout(timer);
        fail(`ended before it was ready (${describeExit(exit)})`, exit);
      });
    });
  }
}

/**
 * The child has its own process group, so that Ctrl-C reaches only the parent, which stops things in order. It
 * writes to its log file itself where it can: a pipe would break with the parent, and whoever logs into a broken
 * pipe may not end.
 */
function launch({ command, args, env, cwd, logFile, readyWhen }: ProcessRecipe): {
  child: ChildProcess;
  tail: OutputTail;
} {
  const options = { detached: true, ...(env ? { env } : {}), ...(cwd ? { cwd } : {}) };
  if (logFile) mkdirSync(dirname(logFile), { recursive: true, mode: 0o700 });
  if (readyWhen === "message" && logFile) {
    const tail = new FileTail(logFile);
    const log = openSync(logFile, "a", 0o600);
    const child = spawn(command, args, { ...options, stdio: ["ignore", log, log, "ipc"] });
    closeSync(log);
    return { child, tail };
  }
  const ipc = readyWhen === "message" ? (["ipc"] as const) : [];
  const child = spawn(command, args, { ...options, stdio: ["ignore", "pipe", "pipe", ...ipc] });
  return { child, tail: new PipeTail(child, logFile) };
}

export function describeExit({ code, signal }: Exit): string {
  return signal ? `by ${signal}` : `with status ${code}`;
}
