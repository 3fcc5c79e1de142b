import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { ownedPaths, pathOf, withPath, type PathOwner } from "./edits/paths";
import { tidyM, type Point2, type Point3 } from "./geometry";
import type { Selection } from "./selection";
import { toPlan, type SizePx, type View } from "./view";

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

/** The strip's own pixels. */
export const strip = { heightPx: 168, marginPx: 22 } as const;

export interface SectionFrame {
  /** The slice stands at this y. */
  sliceY: number;
  /** What lies in the middle of the strip. */
  centreX: number;
  /** Pixels per metre, in both directions. */
  scale: number;
  lowM: number;
  highM: number;
  /** The sensor that it goes through; null where it goes through the middle of the view. */
  sensorName: string | null;
}

/** Through the selected sensor, else through the middle of what the drawing shows; to scale, all heights in view. */
export function sectionFrame(
  document: PlanDocument,
  selection: Selection,
  view: View,
  size: SizePx,
): SectionFrame {
  const [chosen] = selection.filter((item) => item.kind === "sensor");
  const sensor = document.sensors.find(({ id }) => id === chosen?.id);
  const middle = toPlan(view, [size.width / 2, size.height / 2]);
  const { lowM, highM } = heightRange(document);
  return {
    sliceY: sensor?.position[1] ?? tidyM(middle[1]),
    centreX: sensor?.position[0] ?? middle[0],
    scale: (strip.heightPx - 2 * strip.marginPx) / (highM - lowM),
    lowM,
    highM,
    sensorName: sensor?.name ?? null,
  };
}

/** A grid of x and z over the whole strip, `rows` high. */
export function sectionGrid(
  { centreX, scale, lowM }: SectionFrame,
  widthPx: number,
  rows: number,
): { x0M: number; z0M: number; stepM: number; columns: number; rows: number } {
  const stepM = strip.heightPx / scale / (rows - 1);
  return {
    x0M: centreX - widthPx / 2 / scale,
    z0M: lowM - strip.marginPx / scale,
    stepM,
    columns: Math.max(2, Math.ceil(widthPx / scale / stepM) + 1),
    rows,
  };
}
