import { distanceM, flatOf, type Point2, type Point3 } from "./geometry";

/** What the pointer holds on to. The grid is on when `gridM` is above 0. */
export interface SnapSettings {
  vertices: boolean;
  rightAngles: boolean;
  gridM: number;
}

export const defaultSnap: SnapSettings = { vertices: true, rightAngles: true, gridM: 0.1 };

/** shift: right angle at any distance; alt: no snapping at all. */
export interface Modifiers {
  shift: boolean;
  alt: boolean;
  ctrl: boolean;
}

export const noModifiers: Modifiers = { shift: false, alt: false, ctrl: false };

export interface SnapSurroundings {
  snap: SnapSettings;
  /** How near in metres the pointer has to come; grows as one zooms out. */
  reachM: number;
  /** Points to hold on to, with their heights. */
  vertices: readonly Point3[];
  /** The vertices traced so far; right angles are taken from the last of them. */
  trail: readonly Point3[];
}

export interface Snapped {
  at: Point2;
  to: "vertex" | "right angle" | "grid" | null;
  /** Height of the vertex that was snapped to; null for anything else. */
  heightM: number | null;
}

const nearestVertex = (point: Point2, { vertices, reachM }: SnapSurroundings): Point3 | null => {
  let nearest: Point3 | null = null;
  let nearestM = reachM;
  for (const vertex of vertices) {
    const apartM = distanceM(point, flatOf(vertex));
    if (apartM <= nearestM) {
      nearest = vertex;
      nearestM = apartM;
    }
  }
  return nearest;
};

/** Directions that count as right angles: those of the sheet and those of the last leg that has a length on it. */
function squareDirections(trail: readonly Point3[]): Point2[] {
  const directions: Point2[] = [
    [1, 0],
    [0, 1],
  ];
  for (let i = trail.length - 1; i > 0; i--) {
    const [x, y] = trail[i] as Point3;
    const [fromX, fromY] = trail[i - 1] as Point3;
    const lengthM = Math.hypot(x - fromX, y - fromY);
    if (lengthM === 0) continue;
    const along: Point2 = [(x - fromX) / lengthM, (y - fromY) / lengthM];
    directions.push(along, [-along[1], along[0]]);
    break;
  }
  return directions;
}

const toGrid = (valueM: number, gridM: number): number =>
  gridM > 0 ? Number((Math.round(valueM / gridM) * gridM).toFixed(6)) : valueM;

function onRightAngle(point: Point2, around: SnapSurroundings, anywhere: boolean): Point2 | null {
  const last = around.trail.at(-1);
  if (last === undefined) return null;
  const [dx, dy] = [point[0] - last[0], point[1] - last[1]];
  let best: { at: Point2; offM: number } | null = null;
  for (const [ux, uy] of squareDirections(around.trail)) {
    const offM = Math.abs(dx * uy - dy * ux);
    if (best !== null && offM >= best.offM) continue;
    const alongM = toGrid(dx * ux + dy * uy, around.snap.gridM);
    best = { at: [last[0] + alongM * ux, last[1] + alongM * uy], offM };
  }
  return best !== null && (anywhere || best.offM <= around.reachM) ? best.at : null;
}

/** Where a press at `point` goes: the nearest vertex in reach, else a right angle, else the grid, else right there. */
export function snapPoint(point: Point2, modifiers: Modifiers, around: SnapSurroundings): Snapped {
  if (modifiers.alt) return { at: point, to: null, heightM: null };
  const vertex = around.snap.vertices ? nearestVertex(point, around) : null;
  if (vertex !== null) return { at: flatOf(vertex), to: "vertex", heightM: vertex[2] };
  const square =
    modifiers.shift || around.snap.rightAngles ? onRightAngle(point, around, modifiers.shift) : null;
  if (square !== null) return { at: square, to: "right angle", heightM: null };
  const { gridM } = around.snap;
  if (gridM <= 0) return { at: point, to: null, heightM: null };
  return { at: [toGrid(point[0], gridM), toGrid(point[1], gridM)], to: "grid", heightM: null };
}
