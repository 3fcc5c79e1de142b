/** A place on the plan in metres, x to the right of the sheet and y up it. */
export type Point2 = readonly [number, number];

/** A place in the plan frame in metres, z up from the finished floor. */
export type Point3 = readonly [number, number, number];

export const flatOf = (point: Point3): Point2 => [point[0], point[1]];

export const distanceM = (a: Point2, b: Point2): number => Math.hypot(b[0] - a[0], b[1] - a[1]);

/** Length of a path in space. */
export function pathLengthM(path: readonly Point3[]): number {
  let lengthM = 0;
  for (let i = 1; i < path.length; i++) {
    const a = path[i - 1] as Point3;
    const b = path[i] as Point3;
    lengthM += Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2]);
  }
  return lengthM;
}

/** The place on the segment from `a` to `b` that is nearest to `point`; `along` runs from 0 at `a` to 1 at `b`. */
export function nearestOnSegment(
  point: Point2,
  a: Point2,
  b: Point2,
): { at: Point2; along: number; distanceM: number } {
  const dx = b[0] - a[0];
  const dy = b[1] - a[1];
  const squared = dx * dx + dy * dy;
  const along =
    squared === 0 ? 0 : Math.min(1, Math.max(0, ((point[0] - a[0]) * dx + (point[1] - a[1]) * dy) / squared));
  const at: Point2 = [a[0] + along * dx, a[1] + along * dy];
  return { at, along, distanceM: distanceM(point, at) };
}

/** The leg of a path that passes nearest to `point`, seen from above; null for a path without a leg. */
export function nearestLeg(
  point: Point2,
  path: readonly Point3[],
): { leg: number; at: Point2; along: number; distanceM: number } | null {
  let nearest: { leg: number; at: Point2; along: number; distanceM: number } | null = null;
  for (let leg = 0; leg + 1 < path.length; leg++) {
    const found = nearestOnSegment(point, flatOf(path[leg] as Point3), flatOf(path[leg + 1] as Point3));
    if (nearest === null || found.distanceM < nearest.distanceM) nearest = { leg, ...found };
  }
  return nearest;
}

/** True bearing in degrees, 0 to 360, of the direction from `a` to `b` when +y points to `northBearingDeg`. */
export function bearingDeg(a: Point2, b: Point2, northBearingDeg: number): number {
  const fromUpDeg = (Math.atan2(b[0] - a[0], b[1] - a[1]) * 180) / Math.PI;
  return (((fromUpDeg + northBearingDeg) % 360) + 360) % 360;
}

export interface Bounds {
  minX: number;
  minY: number;
  maxX: number;
  maxY: number;
}

/** The smallest upright rectangle around the points; null without any. */
export function boundsOf(points: Iterable<Point2>): Bounds | null {
  let bounds: Bounds | null = null;
  for (const [x, y] of points) {
    bounds =
      bounds === null
        ? { minX: x, minY: y, maxX: x, maxY: y }
        : {
            minX: Math.min(bounds.minX, x),
            minY: Math.min(bounds.minY, y),
            maxX: Math.max(bounds.maxX, x),
            maxY: Math.max(bounds.maxY, y),
          };
  }
  return bounds;
}

/** Rounds a length to a tenth of a millimetre, so that stored coordinates carry no pixel noise. */
export const tidyM = (valueM: number): number => {
  const rounded = Math.round(valueM * 1e4) / 1e4;
  return rounded === 0 ? 0 : rounded;
};
