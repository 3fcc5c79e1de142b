import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { distanceM, flatOf, nearestOnSegment, type Point2, type Point3 } from "../geometry";
import { freeName, newId } from "./ids";
import { tidyPoint } from "./paths";

type Drawing = PlanDocument["drawing"];

/** What is drawn to work by and carries no current: the datum, marks, mounting zones, clamp-meter loops, section lines. */
export const aidKinds = ["datum", "mark", "zone", "loop", "section-line"] as const;
export type AidKind = (typeof aidKinds)[number];

export const aidTitles: Record<AidKind, string> = {
  datum: "Datum",
  mark: "Mark",
  zone: "Mounting zone",
  loop: "Clamp-meter loop",
  "section-line": "Section line",
};

export interface Aid {
  kind: AidKind;
  /** The datum, of which there is one, is called "datum". */
  id: string;
  name: string;
  points: Point3[];
}

/** Whether its points go round and close. */
export const isClosed = (kind: AidKind): boolean => kind === "zone" || kind === "loop";

/** Whether its points have heights. */
export const hasHeight = (kind: AidKind): boolean => kind !== "zone" && kind !== "section-line";

export const DATUM_ID = "datum";

export function aidsOf({ drawing }: PlanDocument): Aid[] {
  const { datum, marks = [], zones = [], loops = [], sectionLines = [] } = drawing;
  const flat = ([x, y]: Point2): Point3 => [x, y, 0];
  return [
    ...(datum ? [{ kind: "datum" as const, id: DATUM_ID, name: datum.name, points: [datum.position] }] : []),
    ...marks.map(({ id, name, position }) => ({ kind: "mark" as const, id, name, points: [position] })),
    ...zones.map(({ id, name, outline }) => ({ kind: "zone" as const, id, name, points: outline.map(flat) })),
    ...loops.map(({ id, name, polygon }) => ({ kind: "loop" as const, id, name, points: [...polygon] })),
    ...sectionLines.map(({ id, name, a, b }) => ({
      kind: "section-line" as const,
      id,
      name,
      points: [flat(a), flat(b)],
    })),
  ];
}

const replaced = <T extends { id: string }>(list: readonly T[] | undefined, entry: T): T[] =>
  list?.some(({ id }) => id === entry.id)
    ? list.map((other) => (other.id === entry.id ? entry : other))
    : [...(list ?? []), entry];

/** Puts an aid into the plan, in the place of the one with its id if there is one. */
export function withAid(document: PlanDocument, { kind, id, name, points }: Aid): PlanDocument {
  const tidied = points.map(tidyPoint);
  const flat = tidied.map(([x, y]): [number, number] => [x, y]);
  const { drawing } = document;
  const [first, second] = tidied;
  if (first === undefined) return document;
  const part = (): Partial<Drawing> => {
    switch (kind) {
      case "datum":
        return { datum: { ...drawing.datum, name, position: first } };
      case "mark":
        return { marks: replaced(drawing.marks, { id, name, position: first }) };
      case "zone":
        return { zones: replaced(drawing.zones, { id, name, outline: flat }) };
      case "loop":
        return { loops: replaced(drawing.loops, { id, name, polygon: tidied }) };
      case "section-line": {
        const [a, b] = [
          flat[0] as [number, number],
          (second === undefined ? flat[0] : flat[1]) as [number, number],
        ];
        return { sectionLines: replaced(drawing.sectionLines, { id, name, a, b }) };
      }
    }
  };
  return { ...document, drawing: { ...drawing, ...part() } };
}

/** A new aid with a name that no other of its kind bears. */
export function newAid(document: PlanDocument, kind: AidKind, points: Point3[]): Aid {
  if (kind === "datum") return { kind, id: DATUM_ID, name: document.drawing.datum?.name ?? "Datum", points };
  const taken = aidsOf(document).filter((aid) => aid.kind === kind);
  const stems = { mark: "Mark", zone: "Zone", loop: "Loop", "section-line": "Section" } as const;
  return { kind, id: newId("d"), name: freeName(stems[kind], taken), points };
}

export function removeAid(document: PlanDocument, kind: AidKind, id: string): PlanDocument {
  const { datum, ...rest } = document.drawing;
  if (kind === "datum") return { ...document, drawing: rest };
  const without = <T extends { id: string }>(list: T[] | undefined): T[] =>
    (list ?? []).filter((entry) => entry.id !== id);
  const key = ({ mark: "marks", zone: "zones", loop: "loops", "section-line": "sectionLines" } as const)[
    kind
  ];
  const parts = {
    marks: () => ({ marks: without(rest.marks) }),
    zones: () => ({ zones: without(rest.zones) }),
    loops: () => ({ loops: without(rest.loops) }),
    sectionLines: () => ({ sectionLines: without(rest.sectionLines) }),
  };
  return { ...document, drawing: { ...document.drawing, ...(datum && { datum }), ...parts[key]() } };
}

export const aidOf = (document: PlanDocument, kind: AidKind, id: string): Aid | undefined =>
  aidsOf(document).find((aid) => aid.kind === kind && aid.id === id);

/** How near a place comes to an aid as it is seen from above, metres. */
export function distanceToAidM({ kind, points }: Aid, pointM: Point2): number {
  const flat = points.map(flatOf);
  const [only] = flat;
  if (flat.length === 1 && only !== undefined) return distanceM(only, pointM);
  const ends = isClosed(kind) ? [...flat, flat[0] as Point2] : flat;
  return ends
    .slice(1)
    .reduce(
      (nearest, b, i) => Math.min(nearest, nearestOnSegment(pointM, ends[i] as Point2, b).distanceM),
      Infinity,
    );
}

/** A place as people on site measure it: from the datum; null without one. */
export function fromDatum({ drawing }: PlanDocument, [x, y, z]: Point3): [number, number, number] | null {
  if (drawing.datum === undefined) return null;
  const [dx, dy, dz] = drawing.datum.position;
  return tidyPoint([x - dx, y - dy, z - dz]);
}

/** The other way round: a typed offset from the datum to a place in the plan. */
export function toPlanFrame({ drawing }: PlanDocument, [x, y, z]: Point3): [number, number, number] {
  const [dx, dy, dz] = drawing.datum?.position ?? [0, 0, 0];
  return tidyPoint([x + dx, y + dy, z + dz]);
}
