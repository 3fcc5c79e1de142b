import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { z } from "zod";
import { StartFailure } from "./start-failure";

const recordSchema = z.object({ pid: z.number().int(), mark: z.string().min(1) });
const processFileSchema = z.object({ start: recordSchema, children: z.array(recordSchema) });

/** A process, and a part of its command line by which it is known again after a crash. */
export type ProcessRecord = z.output<typeof recordSchema>;

const fileIn = (dataFolder: string): string => join(dataFolder, "run", "processes.json");

/** A process id is used again after a while: only a process with the mark is the one we mean. */
function isRunning({ pid, mark }: ProcessRecord): boolean {
  try {
    const [state] = readFileSync(`/proc/${pid}/stat`, "utf8").split(") ").at(-1) ?? "";
    return state !== "Z" && readFileSync(`/proc/${pid}/cmdline`, "utf8").replaceAll("\0", " ").includes(mark);
  } catch {
    return false;
  }
}

/** Says which processes belong to the data folder, so that a next start finds what a crash left behind. */
export class ProcessFile {
  private readonly children: ProcessRecord[] = [];

  private constructor(
    private readonly dataFolder: string,
    private readonly own: ProcessRecord,
  ) {}

  /**
   * Takes the data folder for this start, and stops what a crashed one left running.
   * @throws StartFailure already-running
   */
  static async claim(dataFolder: string, mark: string, report: (line: string) => void): Promise<ProcessFile> {
    const before = readProcessFile(dataFolder);
    if (before && before.start.pid !== process.pid && isRunning(before.start)) {
      throw new StartFailure(
        "already-running",
        `Stillneedle already runs on the data folder ${dataFolder} (process ${before.start.pid}). ` +
          "Stop it with Ctrl-C, or set DATA_DIR and PORT for a second one.",
      );
    }
    if (before) {
      report("The last run ended without stopping; taking over what it left.");
      for (const child of before.children) await stopLeftOver(child);
    }
    const file = new ProcessFile(dataFolder, { pid: process.pid, mark });
    file.write();
    return file;
  }

  add(child: ProcessRecord): void {
    this.children.push(child);
    this.write();
  }

  release(): void {
    rmSync(fileIn(this.dataFolder), { force: true });
  }

  private write(): void {
    const path = fileIn(this.dataFolder);
    mkdirSync(dirname(path), { recursive: true, mode: 0o700 });
    writeFileSync(path, JSON.stringify({ start: this.own, children: this.children }), { mode: 0o600 });
  }
}

function readProcessFile(dataFolder: string): z.output<typeof processFileSchema> | undefined {
  const path = fileIn(dataFolder);
  if (!existsSync(path)) return undefined;
  try {
    return processFileSchema.parse(JSON.parse(readFileSync(path, "utf8")));
  } catch {
    // Cut short by the crash: it names nobody who could be asked to stop.
    return undefined;
  }
}

const graceMs = 30_000;

async function stopLeftOver(child: ProcessRecord): Promise<void> {
  if (!isRunning(child)) return;
  process.kill(child.pid, "SIGTERM");
  const deadline = Date.now() + graceMs;
  // Somebody else's child: its end can only be looked for.
  while (isRunning(child) && Date.now() < deadline) await pause(25);
  if (isRunning(child)) process.kill(child.pid, "SIGKILL");
}
