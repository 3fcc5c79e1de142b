import { product } from "../measures/measure";
import type { InputVector } from "./input-vectors";
import type { RandomStream } from "./random";

/** Inputs on DC alone that each hold less than this share of the variance are drawn together. */
const LUMPED_SHARE = 0.01;

/** Many small inputs as one normal vector of their covariance: their sum is normal by the central limit theorem (JCGM 100, G.2). */
export class LumpedInputs {
  private readonly root: Float64Array;
  private readonly normals: Float64Array;

  constructor(
    inputs: readonly InputVector[],
    private readonly width: 3 | 9,
  ) {
    const covariance = new Float64Array(width * width);
    for (const { values } of inputs) {
      for (let i = 0; i < width; i++) {
        for (let j = 0; j <= i; j++) {
          const at = width * i + j;
          covariance[at] = (covariance[at] as number) + (values[i] as number) * (values[j] as number);
        }
      }
    }
    this.root = choleskyRoot(covariance, width);
    this.normals = new Float64Array(width);
  }

  /** Adds one draw to the DC group. */
  addTo(groups: Float64Array, random: RandomStream): void {
    const { width, normals, root } = this;
    for (let i = 0; i < width; i++) normals[i] = random.normal();
    for (let i = 0; i < width; i++)
      groups[i] = (groups[i] as number) + product(root, width * i, normals, 0, i + 1);
  }
}

/** Parts the inputs into those drawn one by one and the small ones on DC; the latter null where lumping would gain nothing. */
export function partLumped(
  inputs: readonly InputVector[],
  width: 3 | 9,
): { single: InputVector[]; lumped: LumpedInputs | null } {
  const sizes = inputs.map(({ values }) => product(values, 0, values, 0, values.length));
  const total = sizes.reduce((sum, size) => sum + size, 0);
  const isSmall = inputs.map(
    ({ groups }, i) => groups.length === 1 && groups[0] === 0 && (sizes[i] as number) < LUMPED_SHARE * total,
  );
  const small = inputs.filter((_, i) => isSmall[i]);
  if (small.length <= 2 * width) return { single: [...inputs], lumped: null };
  return { single: inputs.filter((_, i) => !isSmall[i]), lumped: new LumpedInputs(small, width) };
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
