import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { sameJson } from "./difference";

export const mergedLists = ["routes", "circuits", "equipment", "sensors", "loadCases"] as const;
export type MergedList = (typeof mergedLists)[number];

const plainParts = ["name", "frame", "earthField", "unknownPhase"] as const;

/** What may be chosen apart: one object of a list, one of the plan's own settings, or one part of the drawing. */
export interface Piece {
  /** `circuits/c1`, `frame`, `drawing/sheet` */
  key: string;
  list: MergedList | "plan" | "drawing";
  name: string;
  /** Absent where it does not exist in that document. */
  base: unknown;
  mine: unknown;
  theirs: unknown;
}

export type Side = "mine" | "theirs";

export interface Comparison {
  /** Changed by both, differently: somebody has to choose. */
  conflicts: Piece[];
  /** Changed by me alone. */
  onlyMine: Piece[];
  /** Changed by the other person alone. */
  onlyTheirs: Piece[];
}

const absent = undefined;

const nameOf = (value: unknown): string | undefined =>
  typeof value === "object" && value !== null && "name" in value && typeof value.name === "string"
    ? value.name
    : undefined;

function piecesOf(base: PlanDocument, mine: PlanDocument, theirs: PlanDocument): Piece[] {
  const pieces: Piece[] = plainParts.map((part) => ({
    key: part,
    list: "plan",
    name: part,
    base: base[part],
    mine: mine[part],
    theirs: theirs[part],
  }));
  const drawingKeys = new Set([base, mine, theirs].flatMap(({ drawing }) => Object.keys(drawing)));
  for (const part of drawingKeys as Set<keyof PlanDocument["drawing"]>) {
    pieces.push({
      key: `drawing/${part}`,
      list: "drawing",
      name: part,
      base: base.drawing[part],
      mine: mine.drawing[part],
      theirs: theirs.drawing[part],
    });
  }
  for (const list of mergedLists) {
    const find = (document: PlanDocument, id: string) => document[list].find((object) => object.id === id);
    const ids = new Set([theirs, mine, base].flatMap((document) => document[list].map(({ id }) => id)));
    for (const id of ids) {
      const [inBase, inMine, inTheirs] = [find(base, id), find(mine, id), find(theirs, id)];
      const name = nameOf(inMine) ?? nameOf(inTheirs) ?? nameOf(inBase) ?? id;
      pieces.push({ key: `${list}/${id}`, list, name, base: inBase, mine: inMine, theirs: inTheirs });
    }
  }
  return pieces;
}

/** Who changed what since `base`. */
export function compare(base: PlanDocument, mine: PlanDocument, theirs: PlanDocument): Comparison {
  const comparison: Comparison = { conflicts: [], onlyMine: [], onlyTheirs: [] };
  for (const piece of piecesOf(base, mine, theirs)) {
    const byMe = !sameJson(piece.base, piece.mine);
    const byThem = !sameJson(piece.base, piece.theirs);
    if (byMe && byThem && !sameJson(piece.mine, piece.theirs)) comparison.conflicts.push(piece);
    else if (byMe && !byThem) comparison.onlyMine.push(piece);
    else if (byThem && !byMe) comparison.onlyTheirs.push(piece);
  }
  return comparison;
}

/**
 * Both people's changes in one document. What only one of them changed is taken as they left it; of what both changed
 * `choices` says whose by the piece's key, mine where it says nothing. A route that a circuit still names comes back.
 */
export function merge(
  base: PlanDocument,
  mine: PlanDocument,
  theirs: PlanDocument,
  choices: Readonly<Record<string, Side>>,
): PlanDocument {
  const chosen = new Map<string, unknown>();
  for (const { key, base: inBase, mine: inMine, theirs: inTheirs } of piecesOf(base, mine, theirs)) {
    const bothChanged = !sameJson(inBase, inMine) && !sameJson(inBase, inTheirs);
    const takeTheirs = bothChanged ? choices[key] === "theirs" : sameJson(inBase, inMine);
    chosen.set(key, takeTheirs ? inTheirs : inMine);
  }
  const merged = {
    ...theirs,
    ...Object.fromEntries(plainParts.map((part) => [part, chosen.get(part)])),
    drawing: Object.fromEntries(
      [...chosen].flatMap(([key, value]) =>
        key.startsWith("drawing/") && value !== absent ? [[key.slice("drawing/".length), value]] : [],
      ),
    ),
    ...Object.fromEntries(
      mergedLists.map((list) => [
        list,
        [...chosen].flatMap(([key, value]) =>
          key.startsWith(`${list}/`) && value !== absent ? [value] : [],
        ),
      ]),
    ),
  } as PlanDocument;
  return mendReferences(merged, [mine, theirs, base]);
}

/** Brings back routes that circuits name, and drops factors and schedule lines of circuits that are gone. */
function mendReferences(merged: PlanDocument, sources: readonly PlanDocument[]): PlanDocument {
  const present = new Set(merged.routes.map(({ id }) => id));
  const missing = new Set(
    merged.circuits.flatMap(({ route }) => (route === null || present.has(route.id) ? [] : [route.id])),
  );
  const broughtBack = [...missing].flatMap((id) => {
    const route = sources.flatMap(({ routes }) => routes).find((candidate) => candidate.id === id);
    return route === undefined ? [] : [route];
  });
  const sourceIds = new Set([...merged.circuits, ...merged.equipment].map(({ id }) => id));
  const { schedule } = merged.drawing;
  return {
    ...merged,
    routes: [...merged.routes, ...broughtBack],
    loadCases: merged.loadCases.map((loadCase) => ({
      ...loadCase,
      factors: Object.fromEntries(Object.entries(loadCase.factors).filter(([id]) => sourceIds.has(id))),
    })),
    drawing: {
      ...merged.drawing,
      ...(schedule && { schedule: schedule.filter(({ circuitId }) => sourceIds.has(circuitId)) }),
    },
  };
}

/** What happened to a piece from `base` to one side, in words: "added", "deleted", "changed: path, supply". */
export function changeWords(base: unknown, side: unknown): string {
  if (base === absent) return side === absent ? "not there" : "added";
  if (side === absent) return "deleted";
  if (sameJson(base, side)) return "unchanged";
  if (typeof base !== "object" || base === null || typeof side !== "object" || side === null)
    return "changed";
  if (Array.isArray(base) || Array.isArray(side)) return "changed";
  const [before, after] = [base as Record<string, unknown>, side as Record<string, unknown>];
  const keys = [...new Set([...Object.keys(before), ...Object.keys(after)])];
  const changed = keys.filter((key) => !sameJson(before[key], after[key]));
  return `changed: ${changed.map((key) => `${words[key] ?? key}${valueWords(after[key])}`).join(", ")}`;
}

/** A value that is short enough to compare at a glance, with a space before it; "" for anything longer. */
function valueWords(value: unknown): string {
  if (typeof value === "string") return ` “${value}”`;
  if (typeof value === "number") return ` ${value}`;
  if (Array.isArray(value) && value.length <= 3 && value.every((part) => typeof part === "number")) {
    return ` (${value.join(", ")})`;
  }
  const short = value as { kind?: unknown; currentA?: unknown } | null | undefined;
  if (value === null) return " not known";
  if (typeof short?.kind !== "string") return "";
  return typeof short.currentA === "number" ? ` ${short.kind}, ${short.currentA} A` : ` ${short.kind}`;
}

const words: Record<string, string> = {
  conductorRadiusM: "conductor radius",
  currentBasis: "basis of the current",
  currentTolerancePercent: "tolerance of the current",
  positionToleranceM: "position tolerance",
  spacingTolerancePercent: "tolerance of the spacing",
  strayCurrentA: "stray current",
  strayToleranceA: "bound of the stray current",
  northBearingDeg: "north",
  path: "vertices",
};
