import type { Circuit } from "~/domain/plan-document/circuit";

export type Point = [number, number, number];

/** A conductor with its current as a function of time (A, instantaneous; t in s) and what flows in it as DC. */
export interface OracleConductor {
  points: Point[];
  dcA: number;
  alternatingA: (timeS: number) => number;
}

/*
 * The slow and obvious way: frames by rotation matrices, mitres by cutting each conductor's line with the bisector plane,
 * currents as functions of time.
 */

const minus = (a: Point, b: Point): Point => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const plus = (a: Point, b: Point, k = 1): Point => [a[0] + k * b[0], a[1] + k * b[1], a[2] + k * b[2]];
const dot = (a: Point, b: Point) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Point, b: Point): Point => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const unit = (a: Point): Point => plus([0, 0, 0], a, 1 / Math.sqrt(dot(a, a)));

/** Rodrigues' rotation of v about the unit axis k by an angle. */
function rotate(v: Point, k: Point, angle: number): Point {
  const turned = plus(plus([0, 0, 0], v, Math.cos(angle)), cross(k, v), Math.sin(angle));
  return plus(turned, k, dot(k, v) * (1 - Math.cos(angle)));
}

/** The line of a conductor at section offset (p, q) of a path without collinear legs, with its joints at both ends. */
export function oracleLine(path: Point[], p: number, q: number): Point[] {
  const tangents = path.slice(1).map((to, i) => unit(minus(to, path[i] as Point)));
  const [first] = tangents as [Point];
  let u: Point = Math.abs(first[2]) > Math.cos(Math.PI / 180) ? [1, 0, 0] : unit(cross(first, [0, 0, 1]));
  const sections = tangents.map((t, i) => {
    const before = tangents[i - 1];
    if (before) {
      const axis = cross(before, t);
      const angle = Math.atan2(Math.sqrt(dot(axis, axis)), dot(before, t));
      if (angle > 1e-12) u = rotate(u, unit(axis), angle);
    }
    return plus(plus([0, 0, 0], u, p), cross(u, t), q);
  });
  const line: Point[] = [path[0] as Point, plus(path[0] as Point, sections[0] as Point)];
  tangents.slice(1).forEach((next, i) => {
    const vertex = path[i + 1] as Point;
    const t = tangents[i] as Point;
    const normal = unit(plus(t, next));
    const on = plus(vertex, sections[i] as Point);
    line.push(plus(on, t, dot(minus(vertex, on), normal) / dot(t, normal)));
  });
  const last = path[path.length - 1] as Point;
  line.push(plus(last, sections[sections.length - 1] as Point), last);
  return line;
}

const DEGREE = Math.PI / 180;

/** Conductors of pairs, flats, trefoils and quads at 50 Hz or DC, without parallel sets. */
export function oracleConductors(circuit: Circuit): OracleConductor[] {
  const { arrangement, supply, path } = circuit;
  if (!path || !supply) throw new Error("the oracle needs a path and a supply");
  const d = "spacingM" in arrangement ? arrangement.spacingM : 0;
  const h = (Math.sqrt(3) / 2) * d;
  const places: Record<string, Point[]> = {
    single: [[0, 0, 0]],
    pair: [
      [-d / 2, 0, 0],
      [d / 2, 0, 0],
    ],
    flat: [
      [-d, 0, 0],
      [0, 0, 0],
      [d, 0, 0],
    ],
    trefoil: [
      [-d / 2, -h / 3, 0],
      [d / 2, -h / 3, 0],
      [0, (2 * h) / 3, 0],
    ],
    quad: [
      [-d / 2, d / 2, 0],
      [d / 2, d / 2, 0],
      [d / 2, -d / 2, 0],
      [-d / 2, -d / 2, 0],
    ],
  };
  const roll = arrangement.rollDeg * DEGREE;
  return (places[arrangement.kind] ?? []).map((place, index) => {
    const [p, q] = rotate(place, [0, 0, 1], roll);
    return { points: oracleLine(path, p, q), ...currentOf(circuit, index) };
  });
}

function currentOf(
  { supply, strayCurrentA, strayAngleDeg }: Circuit,
  index: number,
): Omit<OracleConductor, "points"> {
  if (!supply) throw new Error("no supply");
  const stray = strayCurrentA ?? 0;
  if (supply.kind === "dc") {
    return { dcA: index === 0 ? supply.currentA : stray - supply.currentA, alternatingA: () => 0 };
  }
  const wave = (rmsA: number, angleDeg: number) => (timeS: number) =>
    Math.SQRT2 * rmsA * Math.cos(2 * Math.PI * supply.frequencyHz * timeS + angleDeg * DEGREE);
  const leaking = wave(stray, strayAngleDeg);
  if (supply.kind === "ac1") {
    const go = wave(supply.currentA, supply.phaseDeg);
    return { dcA: 0, alternatingA: index === 0 ? go : (timeS) => leaking(timeS) - go(timeS) };
  }
  const angles = supply.sequence === "abc" ? [0, -120, 120] : [0, 120, -120];
  const phases = angles.map((angle) => wave(supply.currentA ?? 0, angle + supply.phaseDeg));
  const phase = phases[index];
  if (phase) return { dcA: 0, alternatingA: phase };
  return {
    dcA: 0,
    alternatingA: (timeS) => phases.reduce((sum, other) => sum - other(timeS), leaking(timeS)),
  };
}
