import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { aidsOf } from "~/sheet/edits/aids";
import { ownedPaths } from "~/sheet/edits/paths";
import { sheetCorners } from "~/sheet/edits/scale";
import { boundsOf, flatOf, type Bounds } from "~/sheet/geometry";

/** What an empty plan shows: a room of 12 by 8 metres. */
const emptyRoom: Bounds = { minX: 0, minY: 0, maxX: 12, maxY: 8 };

/** All that is drawn, the image included. */
export function planBounds(document: PlanDocument): Bounds {
  const { sheet } = document.drawing;
  const points = [
    ...(sheet === undefined ? [] : sheetCorners(sheet)),
    ...ownedPaths(document).flatMap(({ path }) => path.map(flatOf)),
    ...document.sensors.map(({ position }) => flatOf(position)),
    ...aidsOf(document).flatMap(({ points: drawn }) => drawn.map(flatOf)),
    ...document.equipment.map(({ centre }) => flatOf(centre)),
  ];
  return boundsOf(points) ?? emptyRoom;
}
