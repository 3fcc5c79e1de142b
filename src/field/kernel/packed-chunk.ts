import { MU_0 } from "../../domain/units";
import { SEGMENT_STRIDE, type SegmentRows } from "../segment";

/** What segment.as reads of a segment and of a run's first vertex, in numbers. */
const PACKED_SEGMENT = 9;
const PACKED_VERTEX = 3;

// Small enough for the cache between the points of a block, large enough that a call of the kernel lasts.
const CHUNK_ROWS = 4096;
const CHUNK_SETS = 256;

const SCALE = MU_0 / (4 * Math.PI);

/** Sets `firstSet` ≤ set < `lastSet`, which the kernel takes in one call. */
export interface Chunk {
  firstSet: number;
  lastSet: number;
}

/** Cuts the sets into chunks of bounded size; a set is never cut, however long. */
export function chunksOf(setStarts: ArrayLike<number>): Chunk[] {
  const setCount = setStarts.length - 1;
  const chunks: Chunk[] = [];
  let firstSet = 0;
  while (firstSet < setCount) {
    const firstRow = setStarts[firstSet] as number;
    let lastSet = firstSet + 1;
    while (
      lastSet < setCount &&
      lastSet - firstSet < CHUNK_SETS &&
      (setStarts[lastSet + 1] as number) - firstRow <= CHUNK_ROWS
    ) {
      lastSet++;
    }
    chunks.push({ firstSet, lastSet });
    firstSet = lastSet;
  }
  return chunks;
}

/** Numbers that `packChunk` may write for so many rows and sets, whatever their runs. */
export const packedRowsLength = (rowCount: number): number => rowCount * (PACKED_VERTEX + PACKED_SEGMENT);
export const packedRunsLength = (rowCount: number, setCount: number): number => rowCount + setCount;

/**
 * Writes the rows of a chunk as segment.as reads them: chains of segments from `packed[rowsAt]`, their lengths from
 * `runs[runsAt]`. A chain goes on while a row starts exactly where the one before ends.
 */
export function packChunk(
  rows: SegmentRows,
  setStarts: ArrayLike<number>,
  chunk: Chunk,
  packed: Float64Array,
  rowsAt: number,
  runs: Int32Array,
  runsAt: number,
): void {
  let to = rowsAt;
  let run = runsAt;
  for (let set = chunk.firstSet; set < chunk.lastSet; set++) {
    const first = (setStarts[set] as number) * SEGMENT_STRIDE;
    const last = (setStarts[set + 1] as number) * SEGMENT_STRIDE;
    const countAt = run++;
    runs[countAt] = 0;
    for (let i = first; i < last; i += SEGMENT_STRIDE) {
      if (i === first || !startsWhereLastEnds(rows, i)) {
        runs[countAt] = (runs[countAt] as number) + 1;
        runs[run++] = 0;
        packed[to++] = rows[i] as number;
        packed[to++] = rows[i + 1] as number;
        packed[to++] = rows[i + 2] as number;
      }
      runs[run - 1] = (runs[run - 1] as number) + 1;
      packSegment(rows, i, packed, to);
      to += PACKED_SEGMENT;
    }
  }
}

function startsWhereLastEnds(rows: SegmentRows, i: number): boolean {
  const end = i - SEGMENT_STRIDE + 3;
  return rows[i] === rows[end] && rows[i + 1] === rows[end + 1] && rows[i + 2] === rows[end + 2];
}

function packSegment(rows: SegmentRows, i: number, packed: Float64Array, to: number): void {
  const endX = rows[i + 3] as number;
  const endY = rows[i + 4] as number;
  const endZ = rows[i + 5] as number;
  const lx = endX - (rows[i] as number);
  const ly = endY - (rows[i + 1] as number);
  const lz = endZ - (rows[i + 2] as number);
  const radius = rows[i + 6] as number;
  packed[to] = endX;
  packed[to + 1] = endY;
  packed[to + 2] = endZ;
  packed[to + 3] = lx;
  packed[to + 4] = ly;
  packed[to + 5] = lz;
  packed[to + 6] = radius * radius * (lx * lx + ly * ly + lz * lz);
  packed[to + 7] = SCALE * (rows[i + 7] as number);
  packed[to + 8] = radius * radius;
}
