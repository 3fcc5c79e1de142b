import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { ownedPaths, pathOf, withPath, type PathOwner } from "./edits/paths";
import type { Point2, Point3 } from "./geometry";

/** Where a leg passes through the slice: `at` is x and z in metres. */
export interface Crossing {
  owner: PathOwner;
  name: string;
  /** The vertex that the leg begins at. */
  leg: number;
  at: Point2;
}

/** A path seen along y, as x and z in metres. */
export interface Profile {
  owner: PathOwner;
  points: readonly Point2[];
}

const isAcross = (a: Point3, b: Point3, sliceY: number): boolean =>
  a[1] !== b[1] && sliceY >= Math.min(a[1], b[1]) && sliceY <= Math.max(a[1], b[1]);

/** Where paths pass through the vertical slice at `sliceY`; a leg that lies in it does not cross it. */
export function crossingsAt(document: PlanDocument, sliceY: number): Crossing[] {
  return ownedPaths(document).flatMap(({ owner, name, path }) =>
    path.slice(1).flatMap((b, leg) => {
      const a = path[leg] as Point3;
      if (!isAcross(a, b, sliceY)) return [];
      const along = (sliceY - a[1]) / (b[1] - a[1]);
      const at: Point2 = [a[0] + along * (b[0] - a[0]), a[2] + along * (b[2] - a[2])];
      return [{ owner, name, leg, at }];
    }),
  );
}

export const profilesOf = (document: PlanDocument): Profile[] =>
  ownedPaths(document).map(({ owner, path }) => ({ owner, points: path.map(([x, , z]): Point2 => [x, z]) }));

/** The heights that a section has to show, floor and ceiling of an ordinary room among them. */
export function heightRange(document: PlanDocument): { lowM: number; highM: number } {
  const heights = [
    ...ownedPaths(document).flatMap(({ path }) => path.map(([, , z]) => z)),
    ...document.sensors.map(({ position }) => position[2]),
  ];
  return { lowM: Math.min(0, ...heights), highM: Math.max(3, ...heights) };
}

/** Lifts a leg by `byM`, with the whole level run that it belongs to, so that no part of it begins to slope. */
export function liftRun(document: PlanDocument, owner: PathOwner, leg: number, byM: number): PlanDocument {
  const path = pathOf(document, owner);
  const [a, b] = [path?.[leg], path?.[leg + 1]];
  if (!path || a === undefined || b === undefined) return document;
  let [first, last] = [leg, leg + 1];
  while (path[first - 1]?.[2] === a[2]) first--;
  while (path[last + 1]?.[2] === b[2]) last++;
  return withPath(
    document,
    owner,
    path.map(([x, y, z], index) => [x, y, index >= first && index <= last ? z + byM : z]),
  );
}
