import { product } from "../measures/measure";
import type { InputVector } from "./input-vectors";
import type { RandomStream } from "./random";

/** Inputs that each hold less than this share of the variance are drawn together. */
const LUMPED_SHARE = 0.01;
/** A covariance of more numbers than this costs more to draw from than it saves. */
const MOST_NUMBERS = 60;

/** Many small inputs as one normal vector of their covariance: their sum is normal by the central limit theorem (JCGM 100, G.2). */
export class LumpedInputs {
  private readonly root: Float64Array;
  private readonly normals: Float64Array;

  /** `places` are the numbers of the groups that the inputs move. */
  constructor(
    inputs: readonly InputVector[],
    private readonly places: Int32Array,
    stride: 6 | 18,
  ) {
    const size = places.length;
    const covariance = new Float64Array(size * size);
    const columnOf = new Map(Array.from(places, (place, column) => [place, column]));
    const dense = new Float64Array(size);
    for (const { groups, values } of inputs) {
      dense.fill(0);
      values.forEach((value, i) => {
        const column = columnOf.get(stride * (groups[Math.floor(i / stride)] as number) + (i % stride));
        if (column !== undefined) dense[column] = value;
      });
      for (let i = 0; i < size; i++) {
        for (let j = 0; j <= i; j++) {
          const at = size * i + j;
          covariance[at] = (covariance[at] as number) + (dense[i] as number) * (dense[j] as number);
        }
      }
    }
    this.root = choleskyRoot(covariance, size);
    this.normals = new Float64Array(size);
  }

  /** Adds one draw to the groups. */
  addTo(groups: Float64Array, random: RandomStream): void {
    const { places, normals, root } = this;
    const size = places.length;
    for (let i = 0; i < size; i++) normals[i] = random.normal();
    for (let i = 0; i < size; i++) {
      const at = places[i] as number;
      groups[at] = (groups[at] as number) + product(root, size * i, normals, 0, i + 1);
    }
  }
}

/**
 * Parts the inputs into those drawn one by one and the small ones; the latter null where lumping would gain nothing. `isNeeded` tells
 * of inputs whose own draws are looked at.
 */
export function partLumped(
  inputs: readonly InputVector[],
  stride: 6 | 18,
  isNeeded: (input: InputVector) => boolean,
): { single: InputVector[]; lumped: LumpedInputs | null } {
  const sizes = inputs.map(({ values }) => product(values, 0, values, 0, values.length));
  const total = sizes.reduce((sum, size) => sum + size, 0);
  const isSmall = inputs.map((input, i) => (sizes[i] as number) < LUMPED_SHARE * total && !isNeeded(input));
  const small = inputs.filter((_, i) => isSmall[i]);
  const places = placesOf(small, stride);
  const pays = small.length > 2 * places.length && places.length <= MOST_NUMBERS;
  if (!pays) return { single: [...inputs], lumped: null };
  const single = inputs.filter((_, i) => !isSmall[i]);
  return { single, lumped: new LumpedInputs(small, places, stride) };
}

/** The numbers of the groups that inputs move; DC has no imaginary part. */
function placesOf(inputs: readonly InputVector[], stride: 6 | 18): Int32Array {
  const groups = [...new Set(inputs.flatMap((input) => input.groups))].sort((a, b) => a - b);
  return Int32Array.from(
    groups.flatMap((group) =>
      Array.from({ length: group === 0 ? stride / 2 : stride }, (_, i) => stride * group + i),
    ),
  );
}

/** Lower triangle L with L Lᵀ = covariance (given by its lower triangle); directions without spread stay nought. */
function choleskyRoot(covariance: Float64Array, n: number): Float64Array {
  const root = new Float64Array(n * n);
  const largest = Math.max(...Array.from({ length: n }, (_, i) => covariance[n * i + i] as number));
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const rest =
        (covariance[n * i + j] as number) - product(root, n * i, root.subarray(n * j, n * j + j), 0, j);
      if (i === j) root[n * i + i] = rest > 1e-14 * largest ? Math.sqrt(rest) : 0;
      else root[n * i + j] = (root[n * j + j] as number) > 0 ? rest / (root[n * j + j] as number) : 0;
    }
  }
  return root;
}
