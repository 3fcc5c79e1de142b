import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { ownedPaths, pathOf, withPath, type PathOwner } from "./edits/paths";
import { flatOf, type Point2, type Point3 } from "./geometry";
import { alongM, offM, placeOnSlice, sliceOf, type Slice, type SliceThrough } from "./slice";
import type { SizePx, View } from "./view";

/** Where a leg passes through the slice: `at` is metres along the slice and height. */
export interface Crossing {
  owner: PathOwner;
  name: string;
  /** The vertex that the leg begins at. */
  leg: number;
  at: Point2;
}

/** A path seen across the slice, as metres along it and height. */
export interface Profile {
  owner: PathOwner;
  points: readonly Point2[];
}

/** Rounding of a turned slice may not hide that a leg lies in it. */
const inSliceM = 1e-9;

/** How far along the leg it passes through the slice, 0 to 1; null where it does not. */
function crossedAt(a: Point3, b: Point3, slice: Slice): number | null {
  const [offA, offB] = [offM(slice, flatOf(a)), offM(slice, flatOf(b))];
  if (Math.abs(offA - offB) < inSliceM || Math.min(offA, offB) > inSliceM || Math.max(offA, offB) < -inSliceM)
    return null;
  return Math.min(1, Math.max(0, offA / (offA - offB)));
}

/** Where paths pass through the slice, beyond the ends of its line too; a leg that lies in it does not cross it. */
export function crossingsAt(document: PlanDocument, slice: Slice): Crossing[] {
  return ownedPaths(document).flatMap(({ owner, name, path }) =>
    path.slice(1).flatMap((b, leg) => {
      const a = path[leg] as Point3;
      const share = crossedAt(a, b, slice);
      if (share === null) return [];
      const flat: Point2 = [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])];
      const at: Point2 = [alongM(slice, flat), a[2] + share * (b[2] - a[2])];
      return [{ owner, name, leg, at }];
    }),
  );
}

export const profilesOf = (document: PlanDocument, slice: Slice): Profile[] =>
  ownedPaths(document).map(({ owner, path }) => ({
    owner,
    points: path.map((vertex): Point2 => [alongM(slice, flatOf(vertex)), vertex[2]]),
  }));

/** The heights that a section has to show, floor and ceiling of an ordinary room among them. */
export function heightRange(document: PlanDocument): { lowM: number; highM: number } {
  const heights = [
    ...ownedPaths(document).flatMap(({ path }) => path.map(([, , z]) => z)),
    ...document.sensors.map(({ position }) => position[2]),
    ...document.equipment.map(({ centre }) => centre[2]),
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

/** The strip's own pixels. */
export const strip = { heightPx: 168, marginPx: 22 } as const;

export interface SectionFrame {
  slice: Slice;
  /** Pixels per metre, in both directions. */
  scale: number;
  lowM: number;
  highM: number;
}

/** To scale, with all heights in view; a section line that is longer than the strip shows its middle. */
export function sectionFrame(
  document: PlanDocument,
  through: SliceThrough,
  view: View,
  size: SizePx,
): SectionFrame {
  const { lowM, highM } = heightRange(document);
  return {
    slice: sliceOf(document, through, view, size),
    scale: (strip.heightPx - 2 * strip.marginPx) / (highM - lowM),
    lowM,
    highM,
  };
}

/** A grid over the whole strip, `rows` high: from `along0M` on along the slice, which is `origin` on the plan. */
export function sectionGrid(
  { slice, scale, lowM }: SectionFrame,
  widthPx: number,
  rows: number,
): { along0M: number; origin: Point2; z0M: number; stepM: number; columns: number; rows: number } {
  const stepM = strip.heightPx / scale / (rows - 1);
  const along0M = slice.centreM - widthPx / 2 / scale;
  return {
    along0M,
    origin: placeOnSlice(slice, along0M),
    z0M: lowM - strip.marginPx / scale,
    stepM,
    columns: Math.max(2, Math.ceil(widthPx / scale / stepM) + 1),
    rows,
  };
}
