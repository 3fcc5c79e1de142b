import type { Searched } from "~/domain/clearing";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Sensor } from "~/domain/plan-document/sensor";
import { radians } from "~/domain/units";
import type { Vector } from "~/field/vector";

type PlanPoint = readonly [number, number];

/** Where a sensor may be moved to: a polygon in the plan, between two heights. */
export interface Region {
  kind: Searched["region"];
  zoneName: string | null;
  outline: readonly PlanPoint[];
  fromHeightM: number;
  toHeightM: number;
  /** Distance from the sensor to the furthest point of it, metres. */
  furthestM: number;
}

/** Room around what is drawn where neither a zone nor a drawing bounds it, metres. */
const MARGIN_M = 3;
/** Heights up to this are looked at even where everything drawn lies lower, metres. */
const ROOM_HEIGHT_M = 2.5;

/** The zone that holds the sensor; without one the uploaded drawing, if that does; otherwise the bounds of what is drawn with a margin. */
export function regionOf(document: PlanDocument, sensor: Sensor): Region {
  const { position } = sensor;
  const zone = (document.drawing.zones ?? []).find(({ outline }) => isInside(outline, position));
  const sheet = sheetOutline(document);
  const [fromHeightM, toHeightM] = heightsOf(document);
  const outline = zone?.outline ?? (isInside(sheet, position) ? sheet : boundsOutline(document));
  const kind = zone ? "zone" : outline === sheet ? "sheet" : "drawn";
  const furthestM = Math.max(
    ...outline.flatMap(([x, y]) =>
      [fromHeightM, toHeightM].map((z) => Math.hypot(x - position[0], y - position[1], z - position[2])),
    ),
  );
  return { kind, zoneName: zone ? zone.name : null, outline, fromHeightM, toHeightM, furthestM };
}

export function isInRegion({ outline, fromHeightM, toHeightM }: Region, at: Vector): boolean {
  return at[2] >= fromHeightM - 1e-9 && at[2] <= toHeightM + 1e-9 && isInside(outline, at);
}

/** Whether a point lies in a polygon, by the parity of the edges to the right of it. */
export function isInside(
  outline: readonly PlanPoint[],
  [x, y]: readonly [number, number, ...number[]],
): boolean {
  let inside = false;
  outline.forEach(([x1, y1], index) => {
    const [x2, y2] = outline[(index + 1) % outline.length] as PlanPoint;
    if (y1 > y !== y2 > y && x < x1 + ((y - y1) / (y2 - y1)) * (x2 - x1)) inside = !inside;
  });
  return inside;
}

/** Corners of the uploaded image in the plan; none without one. */
function sheetOutline({ drawing: { sheet } }: PlanDocument): PlanPoint[] {
  if (!sheet) return [];
  const { widthPx, heightPx, originPx, metresPerPixel, rotationDeg } = sheet;
  const cos = Math.cos(radians(rotationDeg));
  const sin = Math.sin(radians(rotationDeg));
  const corners = [
    [0, 0],
    [0, heightPx],
    [widthPx, heightPx],
    [widthPx, 0],
  ] as const;
  return corners.map(([px, py]): PlanPoint => {
    const x = (px - originPx[0]) * metresPerPixel;
    const y = (originPx[1] - py) * metresPerPixel;
    return [x * cos - y * sin, x * sin + y * cos];
  });
}

function drawnPoints(document: PlanDocument): Vector[] {
  return [
    ...document.sensors.map(({ position }) => position),
    ...document.equipment.map(({ centre }) => centre),
    ...document.routes.flatMap(({ path }) => path),
    ...document.circuits.flatMap(({ path }) => path ?? []),
  ];
}

function boundsOutline(document: PlanDocument): PlanPoint[] {
  let [left, bottom, right, top] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x, y] of drawnPoints(document)) {
    left = Math.min(left, x - MARGIN_M);
    bottom = Math.min(bottom, y - MARGIN_M);
    right = Math.max(right, x + MARGIN_M);
    top = Math.max(top, y + MARGIN_M);
  }
  return [
    [left, bottom],
    [right, bottom],
    [right, top],
    [left, top],
  ];
}

/** From the floor, or the lowest sensor below it, to the ceiling of what people mount at: the highest sensor, at least 2.5 m. */
function heightsOf({ sensors }: PlanDocument): [number, number] {
  const heights = sensors.map(({ position }) => position[2]);
  return [Math.min(0, ...heights), Math.max(ROOM_HEIGHT_M, ...heights)];
}
