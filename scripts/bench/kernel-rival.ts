import { mkdtemp, readFile, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { inRepository } from "../services/repository";
import { runCommand } from "../services/run-command";
import type { KernelInput } from "./kernel-input";

const FLAGS = ["-O3", "-march=native"];

export interface KernelRival {
  /** Compiler and flags. */
  compiledBy: string;
  /** Runs it and gives the CPU seconds of each run. */
  run(runs: number): Promise<number[]>;
  /** What the last run computed, as fillPhasorField lays it out. */
  field(): Promise<Float64Array>;
  dispose(): Promise<void>;
}

/** The plain C loop, compiled now in a folder of its own; undefined where there is no gcc. */
export async function compileRival(input: KernelInput): Promise<KernelRival | undefined> {
  const version = await runCommand("gcc", ["-dumpfullversion"]);
  if (version.status !== 0) return undefined;
  const folder = await mkdtemp(join(tmpdir(), "stillneedle-bench-"));
  const [program, inputFile, outputFile] = ["rival", "input", "output"].map((name) => join(folder, name)) as [
    string,
    string,
    string,
  ];
  await expectSuccess("gcc", [...FLAGS, "-o", program, inRepository("scripts/bench/kernel-rival.c"), "-lm"]);
  await writeFile(inputFile, inputBytes(input));
  return {
    compiledBy: `gcc ${version.stdout.trim()} ${FLAGS.join(" ")}`,
    async run(runs) {
      const stdout = await expectSuccess(program, [inputFile, outputFile, String(runs)]);
      return stdout.trim().split("\n").map(Number);
    },
    async field() {
      const bytes = await readFile(outputFile);
      return new Float64Array(Uint8Array.from(bytes).buffer);
    },
    dispose: () => rm(folder, { recursive: true }),
  };
}

function inputBytes({ setStarts, rows, currentsReIm, points }: KernelInput): Buffer {
  const sizes = Int32Array.from([setStarts.length - 1, rows.length / 8, points.length / 3, 0]);
  const arrays = [sizes, setStarts, rows, currentsReIm, points];
  return Buffer.concat(
    arrays.map((array) => new Uint8Array(array.buffer, array.byteOffset, array.byteLength)),
  );
}

async function expectSuccess(command: string, args: readonly string[]): Promise<string> {
  const { status, stdout, stderr } = await runCommand(command, args);
  if (status !== 0) throw new Error(`${command} ended with status ${status}: ${stderr}`);
  return stdout;
}
