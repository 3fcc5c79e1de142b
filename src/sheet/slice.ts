import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { distanceM, tidyM, type Point2 } from "./geometry";
import type { Selection } from "./selection";
import { toPlan, type SizePx, type View } from "./view";

/** Where a vertical slice stands: places along it are metres from `origin` in the direction `along`, of length 1. */
export interface Slice {
  origin: Point2;
  along: Point2;
  /** What lies in the middle of the strip, metres along. */
  centreM: number;
  /** Where its drawn line begins and ends, metres along; null where it has no ends. */
  line: { fromM: number; toM: number } | null;
  /** The sensor or section line that it goes through; null where it goes through the middle of the view. */
  through: string | null;
}

/** What the slice was asked to go through. */
export type SliceThrough = { kind: "sensor" | "section-line"; id: string } | null;

/** What a selection asks the section to go through; null where it asks for nothing. */
export function slicedBy(selection: Selection): SliceThrough {
  for (const item of selection) {
    if (item.kind === "sensor") return { kind: "sensor", id: item.id };
    if (item.kind === "aid" && item.aid === "section-line") return { kind: "section-line", id: item.id };
  }
  return null;
}

/** Metres along the slice, seen from above. */
export const alongM = ({ origin, along }: Slice, [x, y]: Point2): number =>
  (x - origin[0]) * along[0] + (y - origin[1]) * along[1];

/** Metres from the slice; above 0 on its left. */
export const offM = ({ origin, along }: Slice, [x, y]: Point2): number =>
  (y - origin[1]) * along[0] - (x - origin[0]) * along[1];

export const placeOnSlice = ({ origin, along }: Slice, atM: number): Point2 => [
  origin[0] + atM * along[0],
  origin[1] + atM * along[1],
];

/** Along x through a sensor or the middle of the view, else along a section line; what is gone counts as nothing asked. */
export function sliceOf(document: PlanDocument, through: SliceThrough, view: View, size: SizePx): Slice {
  const across = { along: [1, 0] as Point2, line: null };
  if (through?.kind === "section-line") {
    const drawn = document.drawing.sectionLines?.find(({ id }) => id === through.id);
    const lengthM = drawn === undefined ? 0 : distanceM(drawn.a, drawn.b);
    if (drawn !== undefined && lengthM > 0) {
      const along: Point2 = [(drawn.b[0] - drawn.a[0]) / lengthM, (drawn.b[1] - drawn.a[1]) / lengthM];
      const line = { fromM: 0, toM: lengthM };
      return { origin: drawn.a, along, centreM: lengthM / 2, line, through: drawn.name };
    }
  }
  if (through?.kind === "sensor") {
    const sensor = document.sensors.find(({ id }) => id === through.id);
    if (sensor !== undefined) {
      const [x, y] = sensor.position;
      return { ...across, origin: [0, y], centreM: x, through: sensor.name };
    }
  }
  const [x, y] = toPlan(view, [size.width / 2, size.height / 2]);
  return { ...across, origin: [0, tidyM(y)], centreM: x, through: null };
}
