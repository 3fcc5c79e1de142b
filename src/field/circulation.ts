import { MU_0 } from "../domain/units";
import { add, cross, dot, length, scale, subtract, type Vector } from "./vector";

/** Nodes and weights of the Gauss–Legendre rule on [−1, 1]. */
export interface QuadratureRule {
  nodes: Float64Array;
  weights: Float64Array;
}

/** Gauss–Legendre rule of `count` nodes by Newton's iteration on the Legendre polynomial (Abramowitz and Stegun 25.4.29). */
export function gaussLegendre(count: number): QuadratureRule {
  const nodes = new Float64Array(count);
  const weights = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (count + 0.5));
    let slope = 1;
    for (let iteration = 0; iteration < 50; iteration++) {
      let previous = 1;
      let value = x;
      for (let n = 2; n <= count; n++)
        [previous, value] = [value, ((2 * n - 1) * x * value - (n - 1) * previous) / n];
      slope = (count * (x * value - previous)) / (x * x - 1);
      const step = value / slope;
      x -= step;
      if (Math.abs(step) < 1e-16) break;
    }
    nodes[i] = x;
    weights[i] = 2 / ((1 - x * x) * slope * slope);
  }
  return { nodes, weights };
}

/** Adds a field's components at a point: what `circulation` integrates, any number of sets at once (three numbers each). */
export type FieldAt = (x: number, y: number, z: number, out: Float64Array) => void;

/** ∮B·dl around a closed polygon (m) for every set of `fieldAt` (T/A): tesla metres per ampere. */
export function circulation(
  polygon: readonly Vector[],
  setCount: number,
  fieldAt: FieldAt,
  rule: QuadratureRule,
): Float64Array {
  const sums = new Float64Array(setCount);
  const sample = new Float64Array(3 * setCount);
  polygon.forEach((from, index) => {
    const to = polygon[(index + 1) % polygon.length] ?? from;
    const half = scale(subtract(to, from), 0.5);
    const middle = scale(add(from, to), 0.5);
    rule.nodes.forEach((node, i) => {
      const weight = rule.weights[i] as number;
      sample.fill(0);
      fieldAt(middle[0] + half[0] * node, middle[1] + half[1] * node, middle[2] + half[2] * node, sample);
      for (let set = 0; set < setCount; set++) {
        const along =
          (sample[3 * set] as number) * half[0] +
          (sample[3 * set + 1] as number) * half[1] +
          (sample[3 * set + 2] as number) * half[2];
        sums[set] = (sums[set] as number) + weight * along;
      }
    });
  });
  return sums;
}

/**
 * ∮B·dl per ampere around a polygon for a conductor that runs along `line`, without integrating: μ₀ times the signed
 * crossings of a surface spanned in the polygon, plus, since the law of Biot and Savart closes an open line by radial currents at
 * its ends, the solid angles of that surface seen from them over 4π.
 */
export function linkedCirculation(polygon: readonly Vector[], line: readonly Vector[]): number {
  const triangles = fanOf(polygon);
  let crossings = 0;
  line.forEach((to, index) => {
    const from = line[index - 1];
    if (from) for (const triangle of triangles) crossings += crossing(triangle, from, to);
  });
  const first = line[0];
  const last = line[line.length - 1];
  if (!first || !last) return 0;
  const seen = solidAngle(triangles, last) - solidAngle(triangles, first);
  return MU_0 * (crossings + seen / (4 * Math.PI));
}

type Triangle = readonly [Vector, Vector, Vector];

function fanOf(polygon: readonly Vector[]): Triangle[] {
  const sum = polygon.reduce((total, point) => add(total, point), [0, 0, 0] as Vector);
  const hub = scale(sum, 1 / polygon.length);
  return polygon.map((from, index): Triangle => [hub, from, polygon[(index + 1) % polygon.length] ?? from]);
}

/** +1 where the leg passes through the triangle along its normal (right-handed about its corners), −1 against it, 0 otherwise. */
function crossing([a, b, c]: Triangle, from: Vector, to: Vector): number {
  const normal = cross(subtract(b, a), subtract(c, a));
  const before = dot(normal, subtract(from, a));
  const after = dot(normal, subtract(to, a));
  if (before < 0 === after < 0) return 0;
  const at = add(from, scale(subtract(to, from), before / (before - after)));
  const edges: [Vector, Vector][] = [
    [a, b],
    [b, c],
    [c, a],
  ];
  const inside = edges.every(([p, q]) => dot(normal, cross(subtract(q, p), subtract(at, p))) >= 0);
  if (!inside) return 0;
  return after > before ? 1 : -1;
}

/** Solid angle of triangles seen from a point, positive where their normals point away from it (van Oosterom and Strackee 1983). */
function solidAngle(triangles: readonly Triangle[], from: Vector): number {
  return triangles.reduce((sum, [p, q, r]) => {
    const [a, b, c] = [subtract(p, from), subtract(q, from), subtract(r, from)];
    const [la, lb, lc] = [length(a), length(b), length(c)];
    const triple = dot(a, cross(b, c));
    const divisor = la * lb * lc + dot(a, b) * lc + dot(a, c) * lb + dot(b, c) * la;
    return sum + 2 * Math.atan2(triple, divisor);
  }, 0);
}
