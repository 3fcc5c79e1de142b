import { contours } from "d3-contour";
import type { Point2 } from "./geometry";

/** Values on a regular grid, row by row upwards: value (i, j) lies at (x0 + i·step, y0 + j·step) metres. */
export interface FieldGrid {
  x0M: number;
  y0M: number;
  stepM: number;
  columns: number;
  rows: number;
  values: Float64Array;
}

export interface FieldLine {
  level: number;
  /** Rings and pieces of rings, in metres; the edge of the grid is no part of them. */
  pieces: Point2[][];
}

/** Round levels, 1, 2 and 5 of each decade, between the least and the greatest value; at most `most`, the greatest kept. */
export function roundLevels(least: number, greatest: number, most = 14): number[] {
  if (!(greatest > 0) || !Number.isFinite(greatest)) return [];
  const from = Math.max(least, greatest * 1e-6);
  const levels: number[] = [];
  for (let decade = Math.floor(Math.log10(from)); decade <= Math.log10(greatest); decade++) {
    for (const step of [1, 2, 5]) {
      const level = Number(`${step}e${decade}`);
      if (level > from && level < greatest) levels.push(level);
    }
  }
  return levels.slice(-most);
}

/** Cuts a ring where it runs along the edge of the grid: d3 closes areas there, but no value is on that line. */
function cutAtEdge(ring: readonly number[][], columns: number, rows: number): number[][][] {
  const onEdge = ([x, y]: readonly number[]): boolean =>
    x !== undefined && y !== undefined && (x <= 0.5 || y <= 0.5 || x >= columns - 0.5 || y >= rows - 0.5);
  const pieces: number[][][] = [];
  let piece: number[][] = [];
  for (const place of ring) {
    if (!onEdge(place)) piece.push(place as number[]);
    else if (piece.length > 0) {
      pieces.push([...piece, place as number[]]);
      piece = [];
    } else piece = [];
  }
  if (piece.length > 0) pieces.push(piece);
  return pieces.filter(({ length }) => length > 1);
}

/** Lines of equal value. d3-contour puts value (i, j) at (i + ½, j + ½). */
export function fieldLines(grid: FieldGrid, levels: readonly number[]): FieldLine[] {
  const { columns, rows, x0M, y0M, stepM, values } = grid;
  const inMetres = ([x, y]: readonly number[]): Point2 => [
    x0M + ((x ?? 0) - 0.5) * stepM,
    y0M + ((y ?? 0) - 0.5) * stepM,
  ];
  return contours()
    .size([columns, rows])
    .thresholds([...levels])(Array.from(values))
    .map(({ value, coordinates }) => ({
      level: value,
      pieces: coordinates
        .flat()
        .flatMap((ring) => cutAtEdge(ring, columns, rows).map((piece) => piece.map(inMetres))),
    }));
}

/** Value at a place, linear between its four neighbours; null outside the grid. */
export function valueAt(grid: FieldGrid, [x, y]: Point2): number | null {
  const u = (x - grid.x0M) / grid.stepM;
  const v = (y - grid.y0M) / grid.stepM;
  const i = Math.min(Math.floor(u), grid.columns - 2);
  const j = Math.min(Math.floor(v), grid.rows - 2);
  if (i < 0 || j < 0 || u > grid.columns - 1 || v > grid.rows - 1) return null;
  const value = (column: number, row: number): number => grid.values[row * grid.columns + column] ?? 0;
  const [s, t] = [u - i, v - j];
  return (
    (1 - t) * ((1 - s) * value(i, j) + s * value(i + 1, j)) +
    t * ((1 - s) * value(i, j + 1) + s * value(i + 1, j + 1))
  );
}

/** Places for labels along a line: its middle, and more on long lines, at least `apartM` apart. */
export function labelPlaces(piece: readonly Point2[], apartM: number): { at: Point2; angleRad: number }[] {
  let lengthM = 0;
  const ends = piece.map((point, i) => {
    const before = piece[i - 1];
    if (before !== undefined) lengthM += Math.hypot(point[0] - before[0], point[1] - before[1]);
    return lengthM;
  });
  if (lengthM < apartM) return [];
  const count = Math.max(1, Math.floor(lengthM / (3 * apartM)));
  return Array.from({ length: count }, (_, k) => {
    const wantedM = ((k + 0.5) / count) * lengthM;
    const i = Math.max(
      1,
      ends.findIndex((endM) => endM >= wantedM),
    );
    const [a, b] = [piece[i - 1] as Point2, piece[i] as Point2];
    return { at: [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2], angleRad: Math.atan2(b[1] - a[1], b[0] - a[0]) };
  });
}

/** Short strokes on the side of the line where the value is greater: the side to keep out of. */
export function hatching(
  grid: FieldGrid,
  piece: readonly Point2[],
  apartM: number,
  strokeM: number,
): [Point2, Point2][] {
  const strokes: [Point2, Point2][] = [];
  let sinceM = apartM / 2;
  for (let i = 1; i < piece.length; i++) {
    const [a, b] = [piece[i - 1] as Point2, piece[i] as Point2];
    const legM = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (legM === 0) continue;
    const [ux, uy] = [(b[0] - a[0]) / legM, (b[1] - a[1]) / legM];
    for (let atM = apartM - sinceM; atM <= legM; atM += apartM) {
      const at: Point2 = [a[0] + ux * atM, a[1] + uy * atM];
      const left: Point2 = [at[0] - uy * strokeM, at[1] + ux * strokeM];
      const right: Point2 = [at[0] + uy * strokeM, at[1] - ux * strokeM];
      const higher = (valueAt(grid, left) ?? -1) >= (valueAt(grid, right) ?? -1) ? left : right;
      // Leaning strokes read as hatching where upright ones would read as a scale.
      strokes.push([at, [higher[0] + ux * strokeM * 0.6, higher[1] + uy * strokeM * 0.6]]);
    }
    sinceM = (sinceM + legM) % apartM;
  }
  return strokes;
}
