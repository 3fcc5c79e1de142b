import type { PlanDocument } from "./plan-document/plan-document";

export const comparedKinds = ["route", "circuit", "equipment", "sensor", "load case"] as const;
export type ComparedKind = (typeof comparedKinds)[number];

/** One place of an object, as words; null where that side does not state it. */
export interface FieldChange {
  field: string;
  before: string | null;
  after: string | null;
}

export interface ObjectChange {
  kind: ComparedKind;
  id: string;
  change: "added" | "removed" | "altered";
  /** Null on the side that does not have it. */
  nameBefore: string | null;
  nameAfter: string | null;
  /** Whether its place or path is another one. */
  moved: boolean;
  /** What else differs; empty for what was added or removed. */
  fields: readonly FieldChange[];
}

interface Named {
  id: string;
  name: string;
}

/** Where an object is: these keys make it "moved" and not "changed". */
const placeKeys = new Set(["position", "path", "centre"]);

const objectsOf = (document: PlanDocument): Record<ComparedKind, readonly Named[]> => ({
  route: document.routes,
  circuit: document.circuits,
  equipment: document.equipment,
  sensor: document.sensors,
  "load case": document.loadCases,
});

/**
 * What differs between two plan documents, object by object: first by kind, then by id. Two documents that say the same
 * give nothing, and the comparison the other way round is this one with its sides exchanged.
 */
export function comparePlans(before: PlanDocument, after: PlanDocument): ObjectChange[] {
  const old = objectsOf(before);
  const now = objectsOf(after);
  return comparedKinds.flatMap((kind) => {
    const oldById = new Map(old[kind].map((object) => [object.id, object]));
    const nowById = new Map(now[kind].map((object) => [object.id, object]));
    const ids = [...new Set([...oldById.keys(), ...nowById.keys()])].sort();
    return ids.flatMap((id) => compareObject(kind, id, oldById.get(id), nowById.get(id)));
  });
}

function compareObject(
  kind: ComparedKind,
  id: string,
  before: Named | undefined,
  after: Named | undefined,
): ObjectChange[] {
  const named = { kind, id, nameBefore: before?.name ?? null, nameAfter: after?.name ?? null };
  if (before === undefined) return [{ ...named, change: "added", moved: false, fields: [] }];
  if (after === undefined) return [{ ...named, change: "removed", moved: false, fields: [] }];
  const old = leavesOf(before);
  const now = leavesOf(after);
  const differing = [...new Set([...old.keys(), ...now.keys()])]
    .filter((place) => old.get(place) !== now.get(place))
    .sort();
  if (differing.length === 0) return [];
  const isPlace = (place: string) => placeKeys.has(place.split("/")[0] ?? "");
  const fields = differing
    .filter((place) => !isPlace(place))
    .map((place) => ({
      field: fieldWords(place),
      before: valueWords(place, old.get(place)),
      after: valueWords(place, now.get(place)),
    }));
  return [{ ...named, change: "altered", moved: differing.some(isPlace), fields }];
}

type Leaf = string | number | boolean | null;

/** Every value of an object by its place, such as "supply/currentA"; an empty list or record stands as "[]" or "{}". */
function leavesOf(object: object): Map<string, Leaf> {
  const leaves = new Map<string, Leaf>();
  const walk = (value: unknown, place: string): void => {
    if (value === undefined) return;
    if (typeof value !== "object" || value === null) {
      leaves.set(place, value as Leaf);
      return;
    }
    const entries = Object.entries(value);
    if (entries.length === 0) leaves.set(place, Array.isArray(value) ? "[]" : "{}");
    for (const [key, entry] of entries) walk(entry, place === "" ? key : `${place}/${key}`);
  };
  walk(object, "");
  return leaves;
}

const units: readonly (readonly [suffix: RegExp, unit: string])[] = [
  [/TPerM$/, "T/m"],
  [/Percent$/, "%"],
  [/Deg$/, "°"],
  [/Hz$/, "Hz"],
  [/T$/, "T"],
  [/M$/, "m"],
  [/A$/, "A"],
];

const unitOf = (key: string) => units.find(([suffix]) => suffix.test(key));

/** The key that carries the unit: of a list's entry, the list's own. */
const keyOf = (place: string): string =>
  place
    .split("/")
    .filter((key) => !/^\d+$/.test(key))
    .at(-1) ?? place;

/** "supply, current", "limits 2, limit": keys in words, list places counted from 1. */
function fieldWords(place: string): string {
  return place
    .split("/")
    .reduce<string[]>((words, key) => {
      const last = words.pop();
      if (last !== undefined && /^\d+$/.test(key)) return [...words, `${last} ${String(Number(key) + 1)}`];
      const bare = key.replace(unitOf(key)?.[0] ?? "", "");
      const word = bare.replace(/([a-z])([A-Z])/g, (_, a: string, b: string) => `${a} ${b.toLowerCase()}`);
      return [...words, ...(last === undefined ? [] : [last]), word === "" ? key : word];
    }, [])
    .join(", ");
}

function valueWords(place: string, value: Leaf | undefined): string | null {
  if (value === undefined) return null;
  if (value === null) return "by rule or not known";
  if (value === "[]" || value === "{}") return "none";
  if (typeof value !== "number") return String(value);
  const unit = unitOf(keyOf(place))?.[1];
  if (unit === undefined) return String(value);
  return unit === "°" ? `${String(value)}°` : `${String(value)}\u00a0${unit}`;
}
