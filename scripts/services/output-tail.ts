import type { ChildProcess } from "node:child_process";
import { createWriteStream, readFileSync, statSync } from "node:fs";

/** The end of what a process printed, for messages. */
export interface OutputTail {
  read(): string;
}

const tailLength = 4_000;

/** Of a process that writes to its log file itself; what an earlier run wrote there is left out. */
export class FileTail implements OutputTail {
  private readonly startBytes: number;

  constructor(private readonly file: string) {
    this.startBytes = statSync(file, { throwIfNoEntry: false })?.size ?? 0;
  }

  read(): string {
    return readFileSync(this.file).subarray(this.startBytes).toString("utf8").slice(-tailLength);
  }
}

/** Of a process that writes to pipes, which are carried on to a log file or to this process's own output. */
export class PipeTail implements OutputTail {
  private tail = "";

  constructor(child: ChildProcess, logFile: string | undefined) {
    const log = logFile ? createWriteStream(logFile, { flags: "a", mode: 0o600 }) : undefined;
    for (const stream of [child.stdout, child.stderr]) {
      stream?.on("data", (chunk: Buffer) => {
        this.tail = (this.tail + chunk.toString("utf8")).slice(-tailLength);
        if (log) log.write(chunk);
        else process.stderr.write(chunk);
      });
    }
    child.once("close", () => log?.end());
  }

  read(): string {
    return this.tail;
  }
}
