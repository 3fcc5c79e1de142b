/** A point or direction, three components in the frame its name says. */
export type Vector = readonly [number, number, number];

export const add = (a: Vector, b: Vector): Vector => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const subtract = (a: Vector, b: Vector): Vector => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: Vector, factor: number): Vector => [a[0] * factor, a[1] * factor, a[2] * factor];
export const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const length = (a: Vector): number => Math.hypot(a[0], a[1], a[2]);
export const distance = (a: Vector, b: Vector): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
export const unit = (a: Vector): Vector => scale(a, 1 / length(a));

/** a + b·factor. */
export const along = (a: Vector, b: Vector, factor: number): Vector => [
  a[0] + b[0] * factor,
  a[1] + b[1] * factor,
  a[2] + b[2] * factor,
];

/** The point of the leg from → to nearest to `at`, as the share of the leg's length (0 at its start, 1 at its end). */
export function nearestShare(from: Vector, to: Vector, at: Vector): number {
  const leg = subtract(to, from);
  const squared = dot(leg, leg);
  if (squared === 0) return 0;
  return Math.min(1, Math.max(0, dot(subtract(at, from), leg) / squared));
}

/** Distance from a point to the leg from → to, metres. */
export function distanceToLeg(from: Vector, to: Vector, at: Vector): number {
  return distance(at, along(from, subtract(to, from), nearestShare(from, to, at)));
}
