import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { distanceM, tidyM, type Point2 } from "../geometry";

type Sheet = NonNullable<PlanDocument["drawing"]["sheet"]>;

/** What an image shows until its scale is set: a page across 20 m, so that it is about the size of a floor. */
const unscaledWidthM = 20;

/** Lays an image on the plan with its middle at (0, 0) of an empty plan, or where the former image lay. */
export function layDrawing(
  document: PlanDocument,
  image: { id: string; widthPx: number; heightPx: number },
): PlanDocument {
  const sheet: Sheet = {
    drawingId: image.id,
    widthPx: image.widthPx,
    heightPx: image.heightPx,
    originPx: [0, image.heightPx],
    metresPerPixel: unscaledWidthM / image.widthPx,
    rotationDeg: 0,
  };
  const former = document.drawing.sheet;
  const drawing = Object.fromEntries(Object.entries(document.drawing).filter(([key]) => key !== "scale"));
  // A newer issue of the same page keeps its place: same origin in parts of the image, same width in metres.
  const kept =
    former === undefined
      ? sheet
      : {
          ...sheet,
          originPx: [
            (former.originPx[0] / former.widthPx) * image.widthPx,
            (former.originPx[1] / former.heightPx) * image.heightPx,
          ] as [number, number],
          metresPerPixel: (former.metresPerPixel * former.widthPx) / image.widthPx,
          rotationDeg: former.rotationDeg,
        };
  return { ...document, drawing: { ...drawing, sheet: kept } };
}

/**
 * Sets the scale so that `a` and `b`, given as they lie now, are `knownLengthM` apart. What is drawn stays where it is on
 * the image: x and y of everything grow with it, heights and offsets within a route do not.
 */
export function setScale(document: PlanDocument, a: Point2, b: Point2, knownLengthM: number): PlanDocument {
  const { sheet } = document.drawing;
  const presentM = distanceM(a, b);
  if (sheet === undefined || presentM === 0) return document;
  const factor = knownLengthM / presentM;
  const flat = ([x, y]: Point2): [number, number] => [tidyM(x * factor), tidyM(y * factor)];
  const point = ([x, y, z]: readonly [number, number, number]): [number, number, number] => [
    ...flat([x, y]),
    z,
  ];
  const { drawing } = document;
  return {
    ...document,
    routes: document.routes.map((route) => ({ ...route, path: route.path.map(point) })),
    circuits: document.circuits.map((circuit) => ({
      ...circuit,
      path: circuit.path && circuit.path.map(point),
    })),
    equipment: document.equipment.map((item) => ({ ...item, centre: point(item.centre) })),
    sensors: document.sensors.map((sensor) => ({ ...sensor, position: point(sensor.position) })),
    drawing: {
      ...drawing,
      sheet: { ...sheet, metresPerPixel: sheet.metresPerPixel * factor },
      scale: { a: flat(a), b: flat(b), knownLengthM },
      ...(drawing.marks && {
        marks: drawing.marks.map((mark) => ({ ...mark, position: point(mark.position) })),
      }),
      ...(drawing.datum && { datum: { ...drawing.datum, position: point(drawing.datum.position) } }),
      ...(drawing.zones && {
        zones: drawing.zones.map((zone) => ({ ...zone, outline: zone.outline.map(flat) })),
      }),
      ...(drawing.loops && {
        loops: drawing.loops.map((loop) => ({ ...loop, polygon: loop.polygon.map(point) })),
      }),
      ...(drawing.sectionLines && {
        sectionLines: drawing.sectionLines.map((line) => ({ ...line, a: flat(line.a), b: flat(line.b) })),
      }),
      ...(drawing.notes && { notes: drawing.notes.map((note) => ({ ...note, at: flat(note.at) })) }),
    },
  };
}

/** Where the image's corners lie on the plan, from the upper left one on clockwise, in metres. */
export function sheetCorners(sheet: Sheet): [Point2, Point2, Point2, Point2] {
  const turn = (sheet.rotationDeg * Math.PI) / 180;
  const place = (px: number, py: number): Point2 => {
    const x = (px - sheet.originPx[0]) * sheet.metresPerPixel;
    const y = (sheet.originPx[1] - py) * sheet.metresPerPixel;
    return [x * Math.cos(turn) - y * Math.sin(turn), x * Math.sin(turn) + y * Math.cos(turn)];
  };
  return [
    place(0, 0),
    place(sheet.widthPx, 0),
    place(sheet.widthPx, sheet.heightPx),
    place(0, sheet.heightPx),
  ];
}
