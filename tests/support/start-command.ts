import { spawn } from "node:child_process";
import { inRepository } from "../../scripts/services/repository";

export interface StartCommand {
  pid: number;
  /** Everything it printed so far. */
  output(): string;
  /** Resolves when the pattern stands in the output; fails when it ends without. */
  says(pattern: RegExp): Promise<void>;
  /** Its exit status, or the signal that ended it. */
  ended: Promise<number | NodeJS.Signals>;
  signal(signal: NodeJS.Signals): void;
}

export const runs = /Ctrl-C stops it/;

/** `npm start` without npm, with these variables and none of this process's services. */
export function startCommand(variables: Record<string, string>): StartCommand {
  const { PATH = "", HOME = "", TMPDIR } = process.env;
  const child = spawn(process.execPath, [inRepository("scripts/start.mjs")], {
    env: { PATH, HOME, ...(TMPDIR ? { TMPDIR } : {}), ...variables },
    stdio: ["ignore", "pipe", "pipe"],
  });
  let output = "";
  const listeners = new Set<() => void>();
  for (const stream of [child.stdout, child.stderr]) {
    stream.on("data", (chunk: Buffer) => {
      output += chunk.toString("utf8");
      for (const listener of listeners) listener();
    });
  }
  const ended = new Promise<number | NodeJS.Signals>((resolve) => {
    // Not "close": what a crash leaves running holds no pipe, but nothing here depends on it.
    child.once("exit", (code, signal) => resolve(signal ?? code ?? 1));
  });
  return {
    pid: child.pid ?? 0,
    output: () => output,
    ended,
    signal: (signal) => child.kill(signal),
    says: (pattern) =>
      new Promise((resolve, reject) => {
        const look = () => {
          if (!pattern.test(output)) return;
          listeners.delete(look);
          resolve();
        };
        listeners.add(look);
        look();
        void ended.then((end) =>
          reject(new Error(`It ended (${end}) without saying ${pattern}:\n${output}`)),
        );
      }),
  };
}
