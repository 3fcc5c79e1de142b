import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { duplicateSelection, moveSelection, removeSelection } from "../edits/arrange";
import { aidOf } from "../edits/aids";
import { insertVertex, ownedPaths, pathOf, sameOwner } from "../edits/paths";
import { distanceM, flatOf, type Point2, type Point3 } from "../geometry";
import { hitAt } from "../hit";
import { isSelected, sameItem, toggled, type SelectedItem, type Selection } from "../selection";
import { snapPoint, type Modifiers } from "../snapping";
import { going, stepOf, type Mark, type Step, type StepResult, type Surroundings } from "./step";

type State =
  | { kind: "resting" }
  | { kind: "held"; item: SelectedItem; fromM: Point2; moved: PlanDocument | null }
  | { kind: "boxing"; fromM: Point2; toM: Point2; keep: Selection };

function instructionOf(state: State, count: number): string {
  if (state.kind === "held" && state.moved !== null) return "Release to put it here; Escape puts it back.";
  if (state.kind === "boxing") return "Release to select what lies inside.";
  return count === 0
    ? "Press on a sensor, a route or equipment to select it, or choose a step. Drag over an empty place to select several."
    : "Drag or use the arrow keys to move, Page Up and Page Down for the height, Delete to delete. Ctrl and a press on a route adds a vertex.";
}

/** Where the held thing lies; null for a whole route, which moves by the grid from where it was taken. */
function placeOf(document: PlanDocument, item: SelectedItem): Point3 | null {
  if (item.kind === "sensor") return document.sensors.find(({ id }) => id === item.id)?.position ?? null;
  if (item.kind === "aid") return aidOf(document, item.aid, item.id)?.points[0] ?? null;
  if (item.kind === "equipment") return document.equipment.find(({ id }) => id === item.id)?.centre ?? null;
  return item.kind === "vertex" ? (pathOf(document, item.owner)?.[item.index] ?? null) : null;
}

/** By how much to move so that the held thing lands on what it snaps to. */
function shiftOf(
  item: SelectedItem,
  fromM: Point2,
  toM: Point2,
  modifiers: Modifiers,
  around: Surroundings,
): Point3 {
  const { document, snap, reachM } = around;
  const place = placeOf(document, item);
  const origin = place === null ? fromM : flatOf(place);
  const wanted: Point2 = [origin[0] + toM[0] - fromM[0], origin[1] + toM[1] - fromM[1]];
  const others = ownedPaths(document).flatMap(({ owner, path }) =>
    item.kind === "vertex" && sameOwner(owner, item.owner)
      ? path.filter((vertex, index) => index !== item.index && distanceM(flatOf(vertex), origin) > 0)
      : path,
  );
  const trail = item.kind === "vertex" ? (pathOf(document, item.owner)?.slice(0, item.index) ?? []) : [];
  const { at } = snapPoint(wanted, modifiers, {
    snap: { ...snap, vertices: snap.vertices && item.kind === "vertex" },
    reachM,
    vertices: others,
    trail,
  });
  return [at[0] - origin[0], at[1] - origin[1], 0];
}

/** A riser's two ends lie one above the other in plan and move together, or it would start to lean. */
function withRiserEnds(document: PlanDocument, selection: Selection): Selection {
  const ends = selection.flatMap((item): SelectedItem[] => {
    if (item.kind !== "vertex") return [item];
    const path = pathOf(document, item.owner);
    const place = path?.[item.index];
    if (!path || place === undefined) return [item];
    return path.flatMap((vertex, index) =>
      Math.abs(index - item.index) <= 1 && distanceM(flatOf(vertex), flatOf(place)) < 1e-6
        ? [{ ...item, index }]
        : [],
    );
  });
  return ends.filter((item, index) => ends.findIndex((other) => sameItem(other, item)) === index);
}

function inBox(document: PlanDocument, a: Point2, b: Point2): SelectedItem[] {
  const inside = ([x, y]: Point2): boolean =>
    x >= Math.min(a[0], b[0]) &&
    x <= Math.max(a[0], b[0]) &&
    y >= Math.min(a[1], b[1]) &&
    y <= Math.max(a[1], b[1]);
  const sensors = document.sensors
    .filter(({ position }) => inside(flatOf(position)))
    .map(({ id }): SelectedItem => ({ kind: "sensor", id }));
  const routes = ownedPaths(document)
    .filter(({ path }) => path.every((vertex) => inside(flatOf(vertex))))
    .map(({ owner }): SelectedItem => ({
      kind: owner.list === "routes" ? "route" : "circuit",
      id: owner.id,
    }));
  const equipment = document.equipment
    .filter(({ centre }) => inside(flatOf(centre)))
    .map(({ id }): SelectedItem => ({ kind: "equipment", id }));
  return [...sensors, ...equipment, ...routes];
}

function press(pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult {
  const { document, selection } = around;
  const hit = hitAt(document, selection, pointM, around.reachM);
  if (hit === null) {
    const keep = modifiers.shift ? selection : [];
    return going(stepIn({ kind: "boxing", fromM: pointM, toM: pointM, keep }, keep.length), keep);
  }
  if (modifiers.ctrl && hit.leg !== null) {
    const { owner, index, at } = hit.leg;
    return {
      kind: "finished",
      label: "Insert vertex",
      document: insertVertex(document, owner, index, at),
      select: [{ kind: "vertex", owner, index: index + 1 }],
    };
  }
  const select = modifiers.shift
    ? toggled(selection, hit.item)
    : isSelected(selection, hit.item)
      ? selection
      : [hit.item];
  return going(stepIn({ kind: "held", item: hit.item, fromM: pointM, moved: null }, select.length), select);
}

function drag(state: State, pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult {
  const count = around.selection.length;
  if (state.kind === "boxing") return going(stepIn({ ...state, toM: pointM }, count));
  if (state.kind === "resting") return going(stepIn(state, count));
  // A press is never so still that it would not shift what it selects.
  if (state.moved === null && distanceM(state.fromM, pointM) < around.reachM / 2)
    return going(stepIn(state, count));
  const shift = shiftOf(state.item, state.fromM, pointM, modifiers, around);
  const moving = withRiserEnds(around.document, around.selection);
  return going(stepIn({ ...state, moved: moveSelection(around.document, moving, shift) }, count));
}

function release(state: State, around: Surroundings): StepResult {
  if (state.kind === "boxing") {
    const boxed = inBox(around.document, state.fromM, state.toM);
    const selection = [...state.keep, ...boxed.filter((item) => !isSelected(state.keep, item))];
    return going(stepIn({ kind: "resting" }, selection.length), selection);
  }
  if (state.kind === "held" && state.moved !== null) {
    return { kind: "finished", label: "Move", document: state.moved };
  }
  return going(stepIn({ kind: "resting" }, around.selection.length));
}

const arrows: Readonly<Record<string, Point3>> = {
  ArrowLeft: [-1, 0, 0],
  ArrowRight: [1, 0, 0],
  ArrowUp: [0, 1, 0],
  ArrowDown: [0, -1, 0],
  PageUp: [0, 0, 1],
  PageDown: [0, 0, -1],
};

/** What an arrow key moves by where the grid is off. */
const nudgeM = 0.1;

function key(state: State, pressed: string, modifiers: Modifiers, around: Surroundings): StepResult | null {
  const { document, selection, snap } = around;
  if (pressed === "Escape") {
    const dropping = state.kind === "held" && state.moved !== null;
    return going(stepIn({ kind: "resting" }, 0), dropping ? selection : []);
  }
  if (selection.length === 0) return null;
  const arrow = arrows[pressed];
  if (arrow !== undefined) {
    const stepM = (snap.gridM > 0 ? snap.gridM : nudgeM) * (modifiers.shift ? 10 : modifiers.alt ? 0.1 : 1);
    const by: Point3 = [arrow[0] * stepM, arrow[1] * stepM, arrow[2] * stepM];
    const moving = arrow[2] === 0 ? withRiserEnds(document, selection) : selection;
    return { kind: "finished", label: "Move", document: moveSelection(document, moving, by), joins: "nudge" };
  }
  if (pressed === "Delete" || pressed === "Backspace") {
    return { kind: "finished", label: "Delete", document: removeSelection(document, selection), select: [] };
  }
  if (modifiers.ctrl && pressed.toLowerCase() === "d") {
    const { document: grown, copies } = duplicateSelection(document, selection);
    return { kind: "finished", label: "Duplicate", document: grown, select: copies };
  }
  return null;
}

function marksOf(state: State): Mark[] {
  return state.kind === "boxing" ? [{ kind: "box", from: state.fromM, to: state.toM }] : [];
}

function stepIn(state: State, count: number): Step {
  return stepOf({
    name: "select",
    instruction: instructionOf(state, count),
    marks: marksOf(state),
    preview: state.kind === "held" ? state.moved : null,
    press: (pointM, modifiers, around) => press(pointM, modifiers, around),
    drag: (pointM, modifiers, around) => drag(state, pointM, modifiers, around),
    release: (_pointM, _modifiers, around) => release(state, around),
    key: (pressed, modifiers, around) => key(state, pressed, modifiers, around),
  });
}

/** The resting step: select, move by drag or arrow keys, delete, duplicate. */
export const beginSelect = (count: number): Step => stepIn({ kind: "resting" }, count);
