import { degrees, radians } from "~/domain/units";
import { along, dot, type Vector } from "~/field/vector";

/** A direction from a sensor's present place. Level rays keep its height, vertical ones its place in the plan. */
export interface Ray {
  kind: "level" | "vertical" | "oblique";
  direction: Vector;
}

const LEVEL_RAYS = 24;
const OBLIQUE_RAYS = 8;
const OBLIQUE_RISES_DEG = [30, 60, -30, -60] as const;

/** Straight up and down, every 15° at its height, and every 45° at four slopes. */
export function raysAround(): Ray[] {
  const level = ring(LEVEL_RAYS).map((deg): Ray => ({ kind: "level", direction: directionOf(deg, 0) }));
  const oblique = OBLIQUE_RISES_DEG.flatMap((riseDeg) =>
    ring(OBLIQUE_RAYS).map((deg): Ray => ({ kind: "oblique", direction: directionOf(deg, riseDeg) })),
  );
  const vertical: Ray[] = [
    { kind: "vertical", direction: [0, 0, 1] },
    { kind: "vertical", direction: [0, 0, -1] },
  ];
  return [...level, ...vertical, ...oblique];
}

/** The ray turned about the vertical, counter-clockwise seen from above. */
export function turnedRay({ kind, direction: [x, y, z] }: Ray, byDeg: number): Ray {
  const cos = Math.cos(radians(byDeg));
  const sin = Math.sin(radians(byDeg));
  return { kind, direction: [x * cos - y * sin, x * sin + y * cos, z] };
}

export const pointOn = (from: Vector, { direction }: Ray, distanceM: number): Vector =>
  along(from, direction, distanceM);

export const angleBetweenDeg = (one: Ray, other: Ray): number =>
  degrees(Math.acos(Math.min(1, Math.max(-1, dot(one.direction, other.direction)))));

/** Clockwise from true north in [0, 360), +y pointing to `northBearingDeg`; null straight up or down. */
export function bearingDeg(from: Vector, to: Vector, northBearingDeg: number): number | null {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  if (Math.hypot(dx, dy) < 1e-6) return null;
  const bearing = degrees(Math.atan2(dx, dy)) + northBearingDeg;
  return ((bearing % 360) + 360) % 360;
}

const ring = (count: number): number[] => Array.from({ length: count }, (_, i) => (360 * i) / count);

function directionOf(azimuthDeg: number, riseDeg: number): Vector {
  const level = Math.cos(radians(riseDeg));
  return [
    level * Math.cos(radians(azimuthDeg)),
    level * Math.sin(radians(azimuthDeg)),
    Math.sin(radians(riseDeg)),
  ];
}
