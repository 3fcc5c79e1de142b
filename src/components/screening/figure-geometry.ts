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
  /** Where the balloons stand: the middle of the longest leg, and that leg's direction in degrees. */
  middle: FigurePoint;
  middleAngleDeg: number;
}

/** Width of a figure that has the page to itself. */
const fullWidth = 960;
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

/** A frame that holds everything drawn, `figureWidth` units wide or three quarters of that high, whichever is reached first. */
export function figureFrame(document: PlanDocument, figureWidth = fullWidth): FigureFrame {
  const points: (readonly number[])[] = [
    ...document.sensors.map(({ position }) => position),
    ...document.equipment.map(({ centre }) => centre),
    ...document.routes.flatMap(({ path }) => path),
    ...document.circuits.flatMap(({ path }) => path ?? []),
    ...(document.drawing.zones ?? []).flatMap(({ outline }) => outline),
    ...imageCorners(document.drawing),
  ];
  const xs = points.map(([x = 0]) => x);
  const ys = points.map(([, y = 0]) => y);
  const least = (list: number[]) => list.reduce((a, b) => Math.min(a, b), Infinity);
  const most = (list: number[]) => list.reduce((a, b) => Math.max(a, b), -Infinity);
  const [left, right, bottom, top] =
    points.length === 0 ? [0, 10, 0, 6] : [least(xs), most(xs), least(ys), most(ys)];
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

export interface FigureLabel {
  anchor: "start" | "end" | "middle";
  /** Of the upper of two lines. */
  at: FigurePoint;
}

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

const lineHeight = 16;
const letterWidth = 6.7;

const sampleEvery = 8;

/** Points along lines, close enough together that no label slips between them. */
function sampled(lines: readonly FigureLine[]): FigurePoint[] {
  return lines.flatMap(({ points }) =>
    points.flatMap(([x, y], index) => {
      const [nextX, nextY] = points[index + 1] ?? [x, y];
      const steps = Math.ceil(Math.hypot(nextX - x, nextY - y) / sampleEvery);
      return Array.from({ length: steps + 1 }, (_, step): FigurePoint => {
        const share = steps === 0 ? 0 : step / steps;
        return [x + share * (nextX - x), y + share * (nextY - y)];
      });
    }),
  );
}

/**
 * Places two-line labels beside marks: to the right, or wherever else around the mark they cover nothing; over a line
 * rather than over another label, and to the right again where everything is covered.
 */
export function placeLabels(
  marks: readonly { at: FigurePoint; letters: number }[],
  lines: readonly FigureLine[],
  { width }: Pick<FigureFrame, "width">,
  markRadius: number,
): FigureLabel[] {
  const onLines = sampled(lines).map(([x, y]) => boxAround(x, y, 3, 3));
  const taken: Box[] = marks.map(({ at: [x, y] }) => boxAround(x, y, markRadius, markRadius));
  return marks.map(({ at: [x, y], letters }) => {
    const length = letters * letterWidth;
    const gap = markRadius + 6;
    const candidates: FigureLabel[] = [
      { anchor: "start", at: [x + gap, y - 3] },
      { anchor: "end", at: [x - gap, y - 3] },
      { anchor: "middle", at: [x, y + gap + lineHeight - 4] },
      { anchor: "middle", at: [x, y - gap - lineHeight] },
      { anchor: "start", at: [x + gap * 0.6, y - gap - lineHeight + 4] },
      { anchor: "start", at: [x + gap * 0.6, y + gap + lineHeight - 8] },
    ];
    const boxes = candidates.map((label) => labelBox(label, length));
    const fits = boxes.map(
      (box) => box.left > 4 && box.right < width - 4 && !taken.some((other) => overlap(box, other)),
    );
    const free = boxes.findIndex(
      (box, index) => fits[index] && !onLines.some((other) => overlap(box, other)),
    );
    const chosen = free >= 0 ? free : Math.max(0, fits.indexOf(true));
    const box = boxes[chosen];
    if (box !== undefined) taken.push(box);
    return candidates[chosen] ?? { anchor: "start", at: [x, y] };
  });
}

const boxAround = (x: number, y: number, halfWidth: number, halfHeight: number): Box => ({
  left: x - halfWidth,
  right: x + halfWidth,
  top: y - halfHeight,
  bottom: y + halfHeight,
});

function labelBox({ anchor, at: [x, y] }: FigureLabel, length: number): Box {
  const left = anchor === "start" ? x : anchor === "end" ? x - length : x - length / 2;
  return { left, right: left + length, top: y - lineHeight + 3, bottom: y + lineHeight + 3 };
}

const overlap = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
