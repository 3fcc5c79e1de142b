import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { aidsOf, distanceToAidM } from "./edits/aids";
import { ownedPaths, pathOf, type PathOwner } from "./edits/paths";
import { distanceM, flatOf, nearestLeg, type Point2 } from "./geometry";
import { itemOfPath, selectedOwners, type SelectedItem, type Selection } from "./selection";

export interface Leg {
  owner: PathOwner;
  /** The vertex that the leg begins at. */
  index: number;
  /** The nearest place on it, with its height. */
  at: [number, number, number];
}

export interface Hit {
  item: SelectedItem;
  /** Given where a leg was hit. */
  leg: Leg | null;
}

function nearestOf<T>(
  things: Iterable<T>,
  placeOf: (thing: T) => Point2,
  pointM: Point2,
  reachM: number,
): T | null {
  let nearest: T | null = null;
  let nearestM = reachM;
  for (const thing of things) {
    const apartM = distanceM(placeOf(thing), pointM);
    if (apartM > nearestM) continue;
    nearest = thing;
    nearestM = apartM;
  }
  return nearest;
}

/** Of vertices one above the other the one that was selected before keeps the hold, else the topmost is taken. */
function hitVertex(
  document: PlanDocument,
  selection: Selection,
  pointM: Point2,
  reachM: number,
): Extract<SelectedItem, { kind: "vertex" }> | null {
  const handles = selectedOwners(document, selection).flatMap((owner) =>
    (pathOf(document, owner) ?? []).map((vertex, index) => ({ owner, index, vertex })),
  );
  const held = handles.filter(({ owner, index }) =>
    selection.some((item) => item.kind === "vertex" && item.index === index && item.owner.id === owner.id),
  );
  const found =
    nearestOf(held, ({ vertex }) => flatOf(vertex), pointM, reachM) ??
    nearestOf(handles, ({ vertex }) => flatOf(vertex), pointM, reachM);
  return found === null ? null : { kind: "vertex", owner: found.owner, index: found.index };
}

function hitLeg(document: PlanDocument, pointM: Point2, reachM: number): Leg | null {
  let nearest: Leg | null = null;
  let nearestM = reachM;
  for (const { owner, path } of ownedPaths(document)) {
    const found = nearestLeg(pointM, path);
    if (found === null || found.distanceM > nearestM) continue;
    const from = path[found.leg]?.[2] ?? 0;
    const to = path[found.leg + 1]?.[2] ?? 0;
    nearest = { owner, index: found.leg, at: [found.at[0], found.at[1], from + found.along * (to - from)] };
    nearestM = found.distanceM;
  }
  return nearest;
}

/** What lies under the pointer: a sensor or equipment, else a vertex of what is selected, else the nearest route or circuit, else what is drawn to work by. */
export function hitAt(
  document: PlanDocument,
  selection: Selection,
  pointM: Point2,
  reachM: number,
): Hit | null {
  const sensor = nearestOf(document.sensors, ({ position }) => flatOf(position), pointM, reachM);
  if (sensor !== null) return { item: { kind: "sensor", id: sensor.id }, leg: null };
  const equipment = nearestOf(document.equipment, ({ centre }) => flatOf(centre), pointM, reachM);
  if (equipment !== null) return { item: { kind: "equipment", id: equipment.id }, leg: null };
  const vertex = hitVertex(document, selection, pointM, reachM);
  if (vertex !== null) return { item: vertex, leg: null };
  const leg = hitLeg(document, pointM, reachM);
  if (leg !== null) return { item: itemOfPath(document, leg.owner), leg };
  const aid = aidsOf(document).find((drawn) => distanceToAidM(drawn, pointM) <= reachM);
  return aid === undefined ? null : { item: { kind: "aid", aid: aid.kind, id: aid.id }, leg: null };
}
