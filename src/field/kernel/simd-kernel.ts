import type { SegmentRows } from "../segment";
import { chunksOf, packChunk, packedRowsLength, packedRunsLength, type Chunk } from "./packed-chunk";
import { INFLUENCE_STRIDE, PHASOR_STRIDE, POINT_STRIDE, type SegmentKernel } from "./segment-kernel";
import { SEGMENT_WASM_BASE64 } from "./segment-wasm";

// Even, since the kernel takes two points at a time.
const BLOCK_POINTS = 256;
const PAGE_BYTES = 65_536;

interface KernelExports {
  memory: WebAssembly.Memory;
  fill(
    points: number,
    pairs: number,
    runs: number,
    sets: number,
    rows: number,
    currents: number,
    out: number,
    setStride: number,
  ): void;
}

/**
 * The kernel in WebAssembly with two doubles a lane, or undefined where there is no WebAssembly SIMD or the page's
 * content security policy lacks 'wasm-unsafe-eval'.
 */
export function createSimdKernel(): SegmentKernel | undefined {
  const kernel = instantiate();
  if (!kernel) return undefined;
  return {
    name: "simd",

    fillInfluence(rows, setStarts, points, out) {
      const pointCount = points.length / POINT_STRIDE;
      for (const chunk of chunksOf(setStarts)) {
        const memory = chunkMemory(
          kernel,
          rows,
          setStarts,
          chunk,
          INFLUENCE_STRIDE * (chunk.lastSet - chunk.firstSet),
        );
        for (let first = 0; first < pointCount; first += BLOCK_POINTS) {
          const count = Math.min(BLOCK_POINTS, pointCount - first);
          memory.setPoints(points, first, count);
          memory.fill(kernel, count, false);
          for (let set = chunk.firstSet; set < chunk.lastSet; set++) {
            const from = memory.outAt + (set - chunk.firstSet) * BLOCK_POINTS * INFLUENCE_STRIDE;
            const block = memory.doubles.subarray(from, from + count * INFLUENCE_STRIDE);
            out.set(block, (set * pointCount + first) * INFLUENCE_STRIDE);
          }
        }
      }
    },

    fillPhasorField(rows, setStarts, currentsReIm, points, out) {
      const pointCount = points.length / POINT_STRIDE;
      out.fill(0, 0, pointCount * PHASOR_STRIDE);
      for (const chunk of chunksOf(setStarts)) {
        const memory = chunkMemory(kernel, rows, setStarts, chunk, PHASOR_STRIDE);
        memory.doubles.set(currentsReIm.subarray(2 * chunk.firstSet, 2 * chunk.lastSet), memory.currentsAt);
        for (let first = 0; first < pointCount; first += BLOCK_POINTS) {
          const count = Math.min(BLOCK_POINTS, pointCount - first);
          memory.setPoints(points, first, count);
          const block = memory.doubles.subarray(memory.outAt, memory.outAt + count * PHASOR_STRIDE);
          block.set(out.subarray(first * PHASOR_STRIDE, (first + count) * PHASOR_STRIDE));
          memory.fill(kernel, count, true);
          out.set(block, first * PHASOR_STRIDE);
        }
      }
    },
  };
}

function instantiate(): KernelExports | undefined {
  if (typeof WebAssembly === "undefined") return undefined;
  const bytes = Uint8Array.from(atob(SEGMENT_WASM_BASE64), (character) => character.charCodeAt(0));
  if (!WebAssembly.validate(bytes)) return undefined;
  try {
    return new WebAssembly.Instance(new WebAssembly.Module(bytes)).exports as unknown as KernelExports;
  } catch (error) {
    // A content security policy refuses to compile what validates; the scalar kernel gives the same figures.
    if (error instanceof WebAssembly.CompileError) return undefined;
    throw error;
  }
}

/** The kernel's memory laid out for one chunk of sets; places are in doubles. */
interface ChunkMemory {
  doubles: Float64Array;
  outAt: number;
  currentsAt: number;
  setPoints(points: Float64Array, first: number, count: number): void;
  fill(kernel: KernelExports, count: number, withCurrents: boolean): void;
}

/** Packs the chunk's rows and makes room for `outPerPoint` numbers for each point of a block. */
function chunkMemory(
  kernel: KernelExports,
  rows: SegmentRows,
  setStarts: ArrayLike<number>,
  chunk: Chunk,
  outPerPoint: number,
): ChunkMemory {
  const setCount = chunk.lastSet - chunk.firstSet;
  const rowCount = (setStarts[chunk.lastSet] as number) - (setStarts[chunk.firstSet] as number);
  const pointsAt = 0;
  const outAt = pointsAt + BLOCK_POINTS * POINT_STRIDE;
  const currentsAt = outAt + BLOCK_POINTS * outPerPoint;
  const rowsAt = currentsAt + 2 * setCount;
  const runsAt = rowsAt + packedRowsLength(rowCount);
  const endByte = 8 * runsAt + 4 * packedRunsLength(rowCount, setCount);
  const missing = endByte - kernel.memory.buffer.byteLength;
  if (missing > 0) kernel.memory.grow(Math.ceil(missing / PAGE_BYTES));
  const doubles = new Float64Array(kernel.memory.buffer);
  packChunk(rows, setStarts, chunk, doubles, rowsAt, new Int32Array(kernel.memory.buffer), 2 * runsAt);
  const setStrideBytes = 8 * BLOCK_POINTS * INFLUENCE_STRIDE;
  return {
    doubles,
    outAt,
    currentsAt,
    setPoints(points, first, count) {
      const block = points.subarray(first * POINT_STRIDE, (first + count) * POINT_STRIDE);
      doubles.set(block, pointsAt);
      if (count % 2 === 1) doubles.set(block.subarray(-POINT_STRIDE), pointsAt + block.length);
    },
    fill({ fill }, count, withCurrents) {
      const pairs = Math.ceil(count / 2);
      const currents = withCurrents ? 8 * currentsAt : 0;
      fill(8 * pointsAt, pairs, 8 * runsAt, setCount, 8 * rowsAt, currents, 8 * outAt, setStrideBytes);
    },
  };
}
