/** Values from `from` to `to` at which something holds. */
export interface Band {
  from: number;
  to: number;
}

/** Bands on the scale that matter: the one from zero up, and the one nearest below the present value where that is another. */
export interface ClearBands {
  fromZero: Band | null;
  nearest: Band | null;
}

const GRID = 24;
const BISECTIONS = 30;
/** Where the present value holds, how far beyond it is looked. */
const FURTHEST = 64;

/**
 * Where `excessOf` is at most 1 between 0 and the present value 1 (and above it, where it holds there). It need not be monotone:
 * looked at on a grid of 24 steps, and at its least value where no step holds.
 */
export function clearBands(excessOf: (factor: number) => number): ClearBands {
  const holds = (factor: number) => excessOf(factor) <= 1;
  const grid = Array.from({ length: GRID + 1 }, (_, i) => i / GRID);
  const excess = grid.map(excessOf);
  const clear = excess.map((value) => value <= 1);
  if (!clear.includes(true)) return { fromZero: null, nearest: pocket(excessOf, grid, excess) };
  const top = clear.lastIndexOf(true);
  let bottom = top;
  while (bottom > 0 && clear[bottom - 1]) bottom--;
  const nearest: Band = {
    from: bottom === 0 ? 0 : edge(holds, grid[bottom] as number, grid[bottom - 1] as number),
    to: top === GRID ? beyond(holds) : edge(holds, grid[top] as number, grid[top + 1] as number),
  };
  if (bottom === 0) return { fromZero: nearest, nearest };
  if (!clear[0]) return { fromZero: null, nearest };
  const last = clear.indexOf(false) - 1;
  return { fromZero: { from: 0, to: edge(holds, grid[last] as number, grid[last + 1] as number) }, nearest };
}

/** The largest factor up to `FURTHEST` that holds in one piece from 1. */
function beyond(holds: (factor: number) => boolean): number {
  let inside = 1;
  while (inside < FURTHEST) {
    if (!holds(2 * inside)) return edge(holds, inside, 2 * inside);
    inside *= 2;
  }
  return FURTHEST;
}

/** Where what holds at `inside` ceases to hold on the way to `outside`; the outcome holds. */
export function edge(holds: (factor: number) => boolean, inside: number, outside: number): number {
  let [good, bad] = [inside, outside];
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = (good + bad) / 2;
    if (holds(middle)) good = middle;
    else bad = middle;
  }
  return good;
}

/** A band narrower than the grid, around the least value. */
function pocket(excessOf: (factor: number) => number, grid: number[], excess: number[]): Band | null {
  const least = excess.indexOf(Math.min(...excess));
  let low = grid[Math.max(0, least - 1)] as number;
  let high = grid[Math.min(GRID, least + 1)] as number;
  for (let i = 0; i < BISECTIONS; i++) {
    const left = low + (high - low) / 3;
    const right = high - (high - low) / 3;
    if (excessOf(left) <= excessOf(right)) high = right;
    else low = left;
  }
  const middle = (low + high) / 2;
  const holds = (factor: number) => excessOf(factor) <= 1;
  if (!holds(middle)) return null;
  const outer = (index: number) => grid[Math.min(GRID, Math.max(0, index))] as number;
  return { from: edge(holds, middle, outer(least - 1)), to: edge(holds, middle, outer(least + 1)) };
}
