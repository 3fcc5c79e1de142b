/** CPU seconds of this process, all its threads, over one call of `work`. */
export function cpuSeconds(work: () => void): number {
  const before = process.cpuUsage();
  work();
  const spent = process.cpuUsage(before);
  return (spent.user + spent.system) / 1e6;
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const upper = sorted[Math.floor(sorted.length / 2)];
  const lower = sorted[Math.ceil(sorted.length / 2) - 1];
  if (upper === undefined || lower === undefined)
    throw new RangeError("The median of no values was asked for.");
  return (lower + upper) / 2;
}

/** Numbers from 0 to 1, the same in every run (Numerical Recipes' linear congruence). */
export function seededRandom(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** A figure as a reader compares it: four significant digits. */
export const rounded = (value: number): number => Number(value.toPrecision(4));
