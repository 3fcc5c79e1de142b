import { sheetCorners } from "../edits/scale";
import { ownedPaths } from "../edits/paths";
import type { Point2, Point3 } from "../geometry";
import { snapPoint, type Modifiers, type Snapped } from "../snapping";
import type { Surroundings } from "./step";

/** Snaps to the vertices of every path, the sensors and the corners of the drawing. */
export function snapHere(
  pointM: Point2,
  modifiers: Modifiers,
  { document, snap, reachM }: Surroundings,
  trail: readonly Point3[] = [],
): Snapped {
  const vertices: Point3[] = [...ownedPaths(document).flatMap(({ path }) => path), ...trail.slice(0, -1)];
  return snapPoint(pointM, modifiers, { snap, reachM, vertices, trail });
}

/** Holds on to corners and vertices only: a scale or a distance is taken between things that are there. */
export function snapToThings(pointM: Point2, modifiers: Modifiers, around: Surroundings): Point2 {
  const { document, reachM, snap } = around;
  const { sheet } = document.drawing;
  const corners = sheet === undefined ? [] : sheetCorners(sheet).map(([x, y]): Point3 => [x, y, 0]);
  const vertices: Point3[] = [
    ...ownedPaths(document).flatMap(({ path }) => path),
    ...document.sensors.map(({ position }) => position),
    ...document.equipment.map(({ centre }) => centre),
    ...corners,
  ];
  const things = { vertices: snap.vertices, rightAngles: false, gridM: 0 };
  return snapPoint(pointM, modifiers, { snap: things, reachM, vertices, trail: [] }).at;
}
