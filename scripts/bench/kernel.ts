import { scalarKernel } from "~/field/kernel/scalar-kernel";
import { segmentKernel } from "~/field/kernel/fill-field";
import type { SegmentKernel } from "~/field/kernel/segment-kernel";
import { kernelInput, POINTS, SEGMENTS, type KernelInput } from "./kernel-input";
import { compileRival } from "./kernel-rival";
import { cpuSeconds, median, rounded } from "./measure";

const ROUNDS = 5;
const RIVAL_RUNS_PER_ROUND = 2;
const GREATEST_DIFFERENCE = 1e-9;

/**
 * The complex field of 2 000 segments at 20 000 points on one thread, against a plain C loop and plain TypeScript.
 * The three take turns, so that whatever else loads the machine loads them alike; medians over the rounds.
 */
export async function benchKernel(): Promise<object> {
  const input = kernelInput();
  const kernel = segmentKernel();
  const out = new Float64Array(2 * input.points.length);
  const typescriptOut = new Float64Array(out.length);
  const rival = await compileRival(input);
  try {
    fill(kernel, input, out);
    fill(scalarKernel, input, typescriptOut);
    const own: number[] = [];
    const typescript: number[] = [];
    const rivals: number[] = [];
    for (let round = 0; round < ROUNDS; round++) {
      if (rival) rivals.push(...(await rival.run(RIVAL_RUNS_PER_ROUND)));
      for (let i = 0; i < RIVAL_RUNS_PER_ROUND; i++) own.push(cpuSeconds(() => fill(kernel, input, out)));
      typescript.push(cpuSeconds(() => fill(scalarKernel, input, typescriptOut)));
    }
    const cpu = median(own);
    const rivalCpu = rival ? median(rivals) : undefined;
    return {
      name: "kernel",
      segments: SEGMENTS,
      points: POINTS,
      sets: input.setStarts.length - 1,
      threads: 1,
      kernel: kernel.name,
      cpuSeconds: rounded(cpu),
      nanosecondsPerPair: rounded((cpu / SEGMENTS / POINTS) * 1e9),
      rival: rival?.compiledBy ?? null,
      rivalCpuSeconds: rivalCpu === undefined ? null : rounded(rivalCpu),
      ratio: rivalCpu === undefined ? null : rounded(rivalCpu / cpu),
      typescriptCpuSeconds: rounded(median(typescript)),
      typescriptDifference: greatestDifference(out, typescriptOut),
      rivalDifference: rival ? rounded(agreeing(greatestDifference(out, await rival.field()))) : null,
    };
  } finally {
    await rival?.dispose();
  }
}

function fill(kernel: SegmentKernel, input: KernelInput, out: Float64Array): void {
  kernel.fillPhasorField(input.rows, input.setStarts, input.currentsReIm, input.points, out);
}

/** The greatest difference between two fields at any point, relative to the field there; it reads every figure. */
function greatestDifference(a: Float64Array, b: Float64Array): number {
  let greatest = 0;
  for (let at = 0; at < a.length; at += 6) {
    const ours = a.subarray(at, at + 6);
    const difference = Math.hypot(...ours.map((value, i) => value - (b[at + i] ?? NaN)));
    greatest = Math.max(greatest, difference / Math.hypot(...ours));
  }
  return greatest;
}

function agreeing(difference: number): number {
  if (difference < GREATEST_DIFFERENCE) return difference;
  throw new Error(
    `The kernel and its rival differ by ${difference} of the field: they do not compute the same.`,
  );
}
