import fc from "fast-check";
import { afterEach, describe, expect, it, vi } from "vitest";
import { add, along, cross, distance, scale, subtract, unit, type Vector } from "../vector";
import { scalarKernel } from "./scalar-kernel";
import type { SegmentKernel } from "./segment-kernel";
import { createSimdKernel } from "./simd-kernel";

const simdKernel = createSimdKernel();
if (!simdKernel) throw new Error("This Node has no WebAssembly SIMD.");
const kernels = [simdKernel, scalarKernel];

interface Segment {
  from: Vector;
  to: Vector;
  radiusM: number;
  share: number;
}
type ConductorRows = readonly Segment[];

function packed(sets: readonly ConductorRows[]) {
  const rows = Float64Array.from(sets.flat().flatMap((s) => [...s.from, ...s.to, s.radiusM, s.share]));
  const setStarts = [0];
  for (const set of sets) setStarts.push((setStarts.at(-1) ?? 0) + set.length);
  return { rows, setStarts };
}

function influence(kernel: SegmentKernel, sets: readonly ConductorRows[], points: Float64Array) {
  const { rows, setStarts } = packed(sets);
  const out = new Float64Array(sets.length * points.length).fill(NaN);
  kernel.fillInfluence(rows, setStarts, points, out);
  return out;
}

function phasors(
  kernel: SegmentKernel,
  sets: readonly ConductorRows[],
  currents: Float64Array,
  points: Float64Array,
) {
  const { rows, setStarts } = packed(sets);
  const out = new Float64Array(2 * points.length).fill(NaN);
  kernel.fillPhasorField(rows, setStarts, currents, points, out);
  return out;
}

const coordinate = fc.double({ min: -30, max: 30, noNaN: true });
const vector = fc.tuple(coordinate, coordinate, coordinate);
const step = fc.oneof(
  vector,
  fc.tuple(fc.constantFrom(-1e5, -7, 1e-3, 4, 1e4), fc.constant(0), fc.constant(0)),
);
const radius = fc.constantFrom(1e-6, 0.002, 0.012, 0.5);
const shareOfCurrent = fc.constantFrom(1, -1, 0.5, 1 / 3);

/** A chain of segments, each starting where the one before ends. */
const polyline = fc
  .tuple(vector, fc.array(step, { minLength: 1, maxLength: 6 }), radius, shareOfCurrent)
  .map(([start, steps, radiusM, share]) => {
    const chain: Segment[] = [];
    let from: Vector = start;
    for (const by of steps) {
      const to = add(from, by);
      if (distance(from, to) > 1e-6) chain.push({ from, to, radiusM, share });
      from = to;
    }
    return chain;
  });
const conductorSets = fc.array(
  fc.array(polyline, { maxLength: 3 }).map((lines) => lines.flat()),
  { minLength: 1, maxLength: 6 },
);

/** A point told by its place beside a segment: how far along, how many radii off, which way. */
const besideSegment = fc.record({
  pick: fc.nat(),
  share: fc.oneof(
    fc.constantFrom(0, 1, 0.5, -1e-9, 1 + 1e-9, -0.1, 1.2),
    fc.double({ min: -2, max: 3, noNaN: true }),
  ),
  radii: fc.constantFrom(0, 1e-9, 0.3, 0.999999, 1, 1.000001, 3, 1e4),
  aside: vector,
});
const points = fc.array(fc.oneof(vector, besideSegment), { minLength: 1, maxLength: 12 });
type Place = Vector | { pick: number; share: number; radii: number; aside: Vector };

function placed(places: readonly Place[], sets: readonly ConductorRows[]): Float64Array {
  const segments = sets.flat();
  return Float64Array.from(
    places.flatMap((place) => {
      if (!("pick" in place)) return place;
      const segment = segments[place.pick % Math.max(1, segments.length)];
      if (!segment) return place.aside;
      const leg = subtract(segment.to, segment.from);
      const across = cross(leg, place.aside);
      const onAxis = place.share === 1 ? segment.to : along(segment.from, leg, place.share);
      if (place.radii === 0 || across.every((value) => value === 0)) return onAxis;
      return add(onAxis, scale(unit(across), place.radii * segment.radiusM));
    }),
  );
}

// Thousands of cases take their time on a loaded machine.
describe("the SIMD kernel", { timeout: 60_000 }, () => {
  it("gives the bits of addSegmentField: far, near, inside, on the axis, on the ends and along the line", () => {
    fc.assert(
      fc.property(conductorSets, points, (sets, places) => {
        const at = placed(places, sets);
        expect(influence(simdKernel, sets, at)).toEqual(influence(scalarKernel, sets, at));
      }),
      { numRuns: 1000 },
    );
  });

  it("gives the bits of the scalar kernel for complex currents", () => {
    fc.assert(
      fc.property(conductorSets, points, fc.infiniteStream(coordinate), (sets, places, stream) => {
        const at = placed(places, sets);
        const currents = Float64Array.from({ length: 2 * sets.length }, () => stream.next().value as number);
        expect(phasors(simdKernel, sets, currents, at)).toEqual(phasors(scalarKernel, sets, currents, at));
      }),
      { numRuns: 500 },
    );
  });
});

describe.each(kernels)("the $name kernel", { timeout: 60_000 }, (kernel) => {
  const random = seeded(7);
  const somewhere = (): Vector => [40 * random(), 30 * random(), 4 * random()];
  const chain = (count: number): Segment[] => {
    const vertices = Array.from({ length: count + 1 }, somewhere);
    return vertices.slice(1).map((to, i) => ({ from: vertices[i] ?? to, to, radiusM: 0.01, share: 1 }));
  };
  // More sets than a chunk takes, one set longer than a chunk, an empty one, and an odd number of points over blocks.
  const sets = [
    ...Array.from({ length: 300 }, () => chain(2)),
    chain(4500),
    [],
    ...Array.from({ length: 5 }, () => chain(3)),
  ];
  const currents = Float64Array.from({ length: 2 * sets.length }, random);
  const at = Float64Array.from(Array.from({ length: 261 }, somewhere).flat());

  it("gives no field, and no NaN, on a segment without length or thickness", () => {
    const from: Vector = [1, 2, 3];
    const point = Float64Array.from([1, 2, 3]);
    const short = { from, to: from, radiusM: 0.01, share: 1 };
    expect(influence(kernel, [[short]], point)).toEqual(new Float64Array(3));
    const thin = { from, to: [1, 2, 9] as const, radiusM: 0, share: 1 };
    for (const z of [3, 5, 9, 11])
      expect(influence(kernel, [[thin]], Float64Array.from([1, 2, z]))).toEqual(new Float64Array(3));
  });

  it("gives each point the same bits alone and among others", () => {
    const together = phasors(kernel, sets, currents, at);
    const block = influence(kernel, sets, at);
    const pointCount = at.length / 3;
    for (const point of [0, 1, 255, 256, 260]) {
      const alone = at.subarray(3 * point, 3 * point + 3);
      expect(phasors(kernel, sets, currents, alone)).toEqual(together.subarray(6 * point, 6 * point + 6));
      const column = influence(kernel, sets, alone);
      for (let set = 0; set < sets.length; set++) {
        const from = 3 * (set * pointCount + point);
        expect(block.subarray(from, from + 3)).toEqual(column.subarray(3 * set, 3 * set + 3));
      }
    }
  });

  it("adds influence times current over the sets in order", () => {
    const block = influence(kernel, sets, at);
    const sums = new Float64Array(2 * at.length);
    for (let set = 0; set < sets.length; set++) {
      for (let i = 0; i < at.length; i++) {
        const fieldT = block[set * at.length + i] ?? NaN;
        sums[2 * i] = (sums[2 * i] ?? 0) + (currents[2 * set] ?? 0) * fieldT;
        sums[2 * i + 1] = (sums[2 * i + 1] ?? 0) + (currents[2 * set + 1] ?? 0) * fieldT;
      }
    }
    expect(phasors(kernel, sets, currents, at)).toEqual(sums);
  });
});

describe("createSimdKernel", () => {
  afterEach(() => {
    vi.unstubAllGlobals();
  });

  it("gives way where there is no WebAssembly, no SIMD, or a policy against compiling", () => {
    const real = WebAssembly;
    vi.stubGlobal("WebAssembly", undefined);
    expect(createSimdKernel()).toBeUndefined();
    vi.stubGlobal("WebAssembly", { ...real, validate: () => false });
    expect(createSimdKernel()).toBeUndefined();
    const refuse = function Module() {
      throw new real.CompileError("blocked by the content security policy");
    };
    vi.stubGlobal("WebAssembly", { validate: () => true, Module: refuse, CompileError: real.CompileError });
    expect(createSimdKernel()).toBeUndefined();
  });
});

/** Numbers from 0 to 1, the same in every run (Numerical Recipes' linear congruence). */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}
