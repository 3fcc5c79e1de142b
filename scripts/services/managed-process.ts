import { spawn, type ChildProcess } from "node:child_process";
import { createWriteStream, mkdirSync, type WriteStream } from "node:fs";
import { dirname } from "node:path";

export interface ProcessRecipe {
  /** What people call it in messages: "the mail fake". */
  name: string;
  command: string;
  args: readonly string[];
  env?: NodeJS.ProcessEnv;
  cwd?: string;
  /** Everything the process prints is appended here. */
  logFile?: string;
  /** Shown as it comes as well, for a process whose log is this process's own. */
  echo?: boolean;
  /**
   * How the process says that it is ready: `message` waits for an IPC message `"ready"` (our own Node
   * processes), a pattern waits for a line that it prints.
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

const tailLength = 4_000;

/** A child process that has said it is ready, and can be stopped. */
export class ManagedProcess {
  readonly exited: Promise<Exit>;
  private tail = "";
  private readonly log: WriteStream | undefined;

  private constructor(
    readonly name: string,
    private readonly child: ChildProcess,
    { logFile, echo = false }: Pick<ProcessRecipe, "logFile" | "echo">,
  ) {
    if (logFile) mkdirSync(dirname(logFile), { recursive: true });
    this.log = logFile ? createWriteStream(logFile, { flags: "a", mode: 0o600 }) : undefined;
    this.exited = new Promise((resolve) => {
      child.once("error", (error) => {
        this.keep(Buffer.from(String(error)));
        resolve({ code: 127, signal: null });
      });
      child.once("close", (code, signal) => {
        this.log?.end();
        resolve({ code, signal });
      });
    });
    if (echo) {
      child.stdout?.pipe(process.stdout, { end: false });
      child.stderr?.pipe(process.stderr, { end: false });
    }
    child.stdout?.on("data", (chunk: Buffer) => this.keep(chunk));
    child.stderr?.on("data", (chunk: Buffer) => this.keep(chunk));
  }

  /** The child has its own process group, so that Ctrl-C reaches only the parent, which stops things in order. */
  static async start(recipe: ProcessRecipe): Promise<ManagedProcess> {
    const withMessages = recipe.readyWhen === "message";
    const child = spawn(recipe.command, recipe.args, {
      detached: true,
      stdio: withMessages ? ["ignore", "pipe", "pipe", "ipc"] : ["ignore", "pipe", "pipe"],
      ...(recipe.env ? { env: recipe.env } : {}),
      ...(recipe.cwd ? { cwd: recipe.cwd } : {}),
    });
    const managed = new ManagedProcess(recipe.name, child, recipe);
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
    return this.tail;
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

  private keep(chunk: Buffer): void {
    this.log?.write(chunk);
    this.tail = (this.tail + chunk.toString("utf8")).slice(-tailLength);
  }

  private becomesReady(readyWhen: ProcessRecipe["readyWhen"], withinMs: number): Promise<void> {
    return new Promise((resolve, reject) => {
      const fail = (what: string, exit?: Exit) =>
        reject(new ProcessFailure(this.name, `${this.name} ${what}`, this.tail, exit));
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
        const look = () => {
          if (readyWhen.test(this.tail)) ready();
        };
        this.child.stdout?.on("data", look);
        this.child.stderr?.on("data", look);
      }
      void this.exited.then((exit) => {
        clearTimeout(timer);
        fail(`ended before it was ready (${describeExit(exit)})`, exit);
      });
    });
  }
}

export function describeExit({ code, signal }: Exit): string {
  return signal ? `by ${signal}` : `with status ${code}`;
}
