import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { sameOwner, pathOf, withPath, withVertex, removeVertex } from "./paths";
import type { Point3 } from "../geometry";
import { selectedOwners, type SelectedItem, type Selection } from "../selection";
import { duplicateCircuit } from "./circuits";
import { aidOf, removeAid, withAid } from "./aids";
import { duplicateEquipment, updateEquipment } from "./equipment";
import { duplicateSensor, updateSensor } from "./sensors";
import { removeCircuitAndEmptyRoute, removeEquipment, removeRoute, removeSensors } from "./remove";
import { tidyPoint } from "./paths";

const shifted = (point: Point3, by: Point3): [number, number, number] =>
  tidyPoint([point[0] + by[0], point[1] + by[1], point[2] + by[2]]);

/** Moves all that is selected. A selected vertex moves alone, unless its whole path is selected too. */
export function moveSelection(document: PlanDocument, selection: Selection, by: Point3): PlanDocument {
  let moved = document;
  for (const item of selection) {
    if (item.kind === "sensor") {
      moved = updateSensor(moved, item.id, (sensor) => ({
        ...sensor,
        position: shifted(sensor.position, by),
      }));
    }
    if (item.kind === "aid") {
      const aid = aidOf(moved, item.aid, item.id);
      if (aid !== undefined)
        moved = withAid(moved, { ...aid, points: aid.points.map((point) => shifted(point, by)) });
    }
    if (item.kind === "equipment") {
      moved = updateEquipment(moved, item.id, (present) => ({
        ...present,
        centre: shifted(present.centre, by),
      }));
    }
  }
  const whole = selectedOwners(
    document,
    selection.filter(({ kind }) => kind !== "vertex"),
  );
  for (const owner of whole) {
    const path = pathOf(moved, owner);
    if (path !== null) {
      moved = withPath(
        moved,
        owner,
        path.map((vertex) => shifted(vertex, by)),
      );
    }
  }
  for (const item of selection) {
    if (item.kind !== "vertex" || whole.some((owner) => sameOwner(owner, item.owner))) continue;
    const vertex = pathOf(moved, item.owner)?.[item.index];
    if (vertex !== undefined) moved = withVertex(moved, item.owner, item.index, shifted(vertex, by));
  }
  return moved;
}

/** Takes out all that is selected; a path keeps at least two vertices. */
export function removeSelection(document: PlanDocument, selection: Selection): PlanDocument {
  const vertices = selection.filter((item) => item.kind === "vertex").sort((a, b) => b.index - a.index);
  const withoutVertices = vertices.reduce(
    (left, { owner, index }) => removeVertex(left, owner, index),
    document,
  );
  return selection.reduce<PlanDocument>((left, item) => {
    if (item.kind === "sensor") return removeSensors(left, [item.id]);
    if (item.kind === "aid") return removeAid(left, item.aid, item.id);
    if (item.kind === "equipment") return removeEquipment(left, [item.id]);
    if (item.kind === "circuit") return removeCircuitAndEmptyRoute(left, item.id);
    return item.kind === "route" ? removeRoute(left, item.id) : left;
  }, withoutVertices);
}

/** Copies the selected sensors, equipment and circuits; tells what to select afterwards. */
export function duplicateSelection(
  document: PlanDocument,
  selection: Selection,
): { document: PlanDocument; copies: SelectedItem[] } {
  const copies: SelectedItem[] = [];
  let grown = document;
  for (const item of selection) {
    if (item.kind === "sensor") {
      const copied = duplicateSensor(grown, item.id);
      if (copied === null) continue;
      grown = copied.document;
      copies.push({ kind: "sensor", id: copied.sensorId });
    } else if (item.kind === "equipment") {
      const copied = duplicateEquipment(grown, item.id);
      if (copied === null) continue;
      grown = copied.document;
      copies.push({ kind: "equipment", id: copied.equipmentId });
    } else if (item.kind === "circuit") {
      const copied = duplicateCircuit(grown, item.id);
      if (copied === null) continue;
      grown = copied.document;
      copies.push({ kind: "circuit", id: copied.circuitId });
    }
  }
  return { document: grown, copies };
}
