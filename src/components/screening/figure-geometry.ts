import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";

/** Figure coordinates: x to the right, y down, in user units. */
export type FigurePoint = readonly [number, number];

export interface FigureFrame {
  width: number;
  height: number;
  /** User units per metre. */
  unitsPerM: number;
  place: (planPoint: readonly number[]) => FigurePoint;
}

export interface FigureLine {
  points: readonly FigurePoint[];
  /** What flows in it; mixed lines are drawn as AC, lines of unknown current as neither. */
  flow: "dc" | "ac" | "unknown";
  circuitIds: readonly string[];
  /** The middle of the longest leg, and that leg's direction in degrees. */
  middle: FigurePoint;
  middleAngleDeg: number;
}

/** Width of a figure that has the page to itself. */
const fullWidth = 1200;
const margin = 56;

/** Corners of the uploaded image in the plan, counter-clockwise from its upper left; empty without one. */
export function imageCorners({ sheet }: PlanDocument["drawing"]): FigurePoint[] {
  if (sheet === undefined) return [];
  const turnRad = (sheet.rotationDeg * Math.PI) / 180;
  const [originX, originY] = sheet.originPx;
  const corners = [
    [0, 0],
    [0, sheet.heightPx],
    [sheet.widthPx, sheet.heightPx],
    [sheet.widthPx, 0],
  ] as const;
  return corners.map(([px, py]): FigurePoint => {
    const x = (px - originX) * sheet.metresPerPixel;
    const y = (originY - py) * sheet.metresPerPixel;
    return [x * Math.cos(turnRad) - y * Math.sin(turnRad), x * Math.sin(turnRad) + y * Math.cos(turnRad)];
  });
}

/** How far the uploaded image is shown beyond what is drawn on it. */
const imageAroundM = 6;

interface Extent {
  left: number;
  right: number;
  bottom: number;
  top: number;
}

function extentOf(points: readonly (readonly number[])[]): Extent | null {
  if (points.length === 0) return null;
  const extent = { left: Infinity, right: -Infinity, bottom: Infinity, top: -Infinity };
  for (const [x = 0, y = 0] of points) {
    extent.left = Math.min(extent.left, x);
    extent.right = Math.max(extent.right, x);
    extent.bottom = Math.min(extent.bottom, y);
    extent.top = Math.max(extent.top, y);
  }
  return extent;
}

/** What is drawn, with the image around it as far as it goes. */
function shownExtent(document: PlanDocument): Extent {
  const drawn = extentOf([
    ...document.sensors.map(({ position }) => position),
    ...document.equipment.map(({ centre }) => centre),
    ...document.routes.flatMap(({ path }) => path),
    ...document.circuits.flatMap(({ path }) => path ?? []),
    ...(document.drawing.zones ?? []).flatMap(({ outline }) => outline),
  ]);
  const image = extentOf(imageCorners(document.drawing));
  if (drawn === null || image === null) return drawn ?? image ?? { left: 0, right: 10, bottom: 0, top: 6 };
  return {
    left: Math.min(drawn.left, Math.max(image.left, drawn.left - imageAroundM)),
    right: Math.max(drawn.right, Math.min(image.right, drawn.right + imageAroundM)),
    bottom: Math.min(drawn.bottom, Math.max(image.bottom, drawn.bottom - imageAroundM)),
    top: Math.max(drawn.top, Math.min(image.top, drawn.top + imageAroundM)),
  };
}

/** A frame that holds everything drawn, `figureWidth` units wide or three quarters of that high, whichever is reached first. */
export function figureFrame(document: PlanDocument, figureWidth = fullWidth): FigureFrame {
  const { left, right, bottom, top } = shownExtent(document);
  const widthM = Math.max(right - left, 1);
  const heightM = Math.max(top - bottom, 1);
  const unitsPerM = Math.min(
    (figureWidth - 2 * margin) / widthM,
    (0.75 * figureWidth - 2 * margin) / heightM,
  );
  return {
    width: widthM * unitsPerM + 2 * margin,
    height: heightM * unitsPerM + 2 * margin,
    unitsPerM,
    place: ([x = 0, y = 0]) => [margin + (x - left) * unitsPerM, margin + (top - y) * unitsPerM],
  };
}

const flowOf = ({ supply }: Circuit): FigureLine["flow"] =>
  supply === null ? "unknown" : supply.kind === "dc" ? "dc" : "ac";

/** Traced circuits as lines; those that share a way share a line. */
export function figureLines(document: PlanDocument, frame: FigureFrame): FigureLine[] {
  const routes = new Map(document.routes.map((route) => [route.id, route.path]));
  const byWay = new Map<string, { path: readonly (readonly number[])[]; circuits: Circuit[] }>();
  for (const circuit of document.circuits) {
    const path = circuit.path ?? (circuit.route === null ? undefined : routes.get(circuit.route.id));
    if (path === undefined) continue;
    const way = JSON.stringify(path);
    const shared = byWay.get(way) ?? { path, circuits: [] };
    shared.circuits.push(circuit);
    byWay.set(way, shared);
  }
  return [...byWay.values()].map(({ path, circuits }) => {
    const points = path.map(frame.place);
    const flows = new Set(circuits.map(flowOf));
    const [flow = "unknown"] = flows;
    return {
      points,
      flow: flows.size === 1 ? flow : "ac",
      circuitIds: circuits.map(({ id }) => id),
      ...longestLeg(points),
    };
  });
}

function longestLeg(points: readonly FigurePoint[]): Pick<FigureLine, "middle" | "middleAngleDeg"> {
  let longest = -1;
  let middle: FigurePoint = points[0] ?? [0, 0];
  let middleAngleDeg = 0;
  points.forEach(([x, y], index) => {
    const next = points[index + 1];
    if (next === undefined) return;
    const length = Math.hypot(next[0] - x, next[1] - y);
    if (length <= longest) return;
    longest = length;
    middle = [(x + next[0]) / 2, (y + next[1]) / 2];
    middleAngleDeg = (Math.atan2(next[1] - y, next[0] - x) * 180) / Math.PI;
  });
  return { middle, middleAngleDeg };
}

/** A round length for the scale bar, about a sixth of the figure. */
export function scaleBarM({ width, unitsPerM }: FigureFrame): number {
  const wantedM = width / unitsPerM / 6;
  const decade = 10 ** Math.floor(Math.log10(wantedM));
  return ([5, 2, 1].find((step) => step * decade <= wantedM) ?? 1) * decade;
}
