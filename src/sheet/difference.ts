/** JSON as the plan document holds it. */
export type Json = unknown;

type Key = string | number;

/** One place where two documents differ. An absent `before` or `after` means that the key is not there at all. */
export type Change =
  | { at: readonly Key[]; before?: Json; after?: Json }
  | { at: readonly Key[]; index: number; removed: readonly Json[]; added: readonly Json[] };

export type Difference = readonly Change[];

const isRecord = (value: Json): value is Record<string, Json> =>
  typeof value === "object" && value !== null && !Array.isArray(value);

export function sameJson(a: Json, b: Json): boolean {
  if (Object.is(a, b)) return true;
  if (Array.isArray(a) && Array.isArray(b)) {
    return a.length === b.length && a.every((item, index) => sameJson(item, b[index]));
  }
  if (!isRecord(a) || !isRecord(b)) return false;
  const keys = Object.keys(a);
  return (
    keys.length === Object.keys(b).length &&
    keys.every((key) => Object.hasOwn(b, key) && sameJson(a[key], b[key]))
  );
}

function collectArray(
  before: readonly Json[],
  after: readonly Json[],
  at: readonly Key[],
  into: Change[],
): void {
  if (before.length === after.length) {
    before.forEach((item, index) => collect(item, after[index], [...at, index], into));
    return;
  }
  const shorter = Math.min(before.length, after.length);
  let head = 0;
  while (head < shorter && sameJson(before[head], after[head])) head++;
  let tail = 0;
  while (tail < shorter - head && sameJson(before[before.length - 1 - tail], after[after.length - 1 - tail]))
    tail++;
  into.push({
    at,
    index: head,
    removed: before.slice(head, before.length - tail),
    added: after.slice(head, after.length - tail),
  });
}

function collect(before: Json, after: Json, at: readonly Key[], into: Change[]): void {
  if (sameJson(before, after)) return;
  if (Array.isArray(before) && Array.isArray(after)) {
    collectArray(before, after, at, into);
    return;
  }
  if (!isRecord(before) || !isRecord(after)) {
    into.push({ at, before, after });
    return;
  }
  for (const key of new Set([...Object.keys(before), ...Object.keys(after)])) {
    const had = Object.hasOwn(before, key);
    const has = Object.hasOwn(after, key);
    if (had && has) collect(before[key], after[key], [...at, key], into);
    else
      into.push({ at: [...at, key], ...(had && { before: before[key] }), ...(has && { after: after[key] }) });
  }
}

/** What turns `before` into `after`, both ways; empty when they say the same. */
export function differenceOf(before: Json, after: Json): Difference {
  const changes: Change[] = [];
  collect(before, after, [], changes);
  return changes;
}

function changeAt(value: Json, at: readonly Key[], depth: number, change: (value: Json) => Json): Json {
  const key = at[depth];
  if (key === undefined) return change(value);
  if (Array.isArray(value)) {
    return value.map((item: Json, index) => (index === key ? changeAt(item, at, depth + 1, change) : item));
  }
  if (!isRecord(value)) throw new Error(`A difference does not fit its document at ${at.join(".")}.`);
  return { ...value, [key]: changeAt(value[key], at, depth + 1, change) };
}

function applyOne(document: Json, change: Change): Json {
  if ("index" in change) {
    return changeAt(document, change.at, 0, (value) => {
      if (!Array.isArray(value))
        throw new Error(`A difference does not fit its document at ${change.at.join(".")}.`);
      return [
        ...value.slice(0, change.index),
        ...change.added,
        ...value.slice(change.index + change.removed.length),
      ];
    });
  }
  if (Object.hasOwn(change, "after")) return changeAt(document, change.at, 0, () => change.after);
  const key = change.at[change.at.length - 1] as Key;
  return changeAt(document, change.at.slice(0, -1), 0, (value) => {
    if (!isRecord(value))
      throw new Error(`A difference does not fit its document at ${change.at.join(".")}.`);
    return Object.fromEntries(Object.entries(value).filter(([name]) => name !== key));
  });
}

const invertOne = (change: Change): Change => {
  if ("index" in change) return { ...change, removed: change.added, added: change.removed };
  return {
    at: change.at,
    ...(Object.hasOwn(change, "after") && { before: change.after }),
    ...(Object.hasOwn(change, "before") && { after: change.before }),
  };
};

export const invert = (difference: Difference): Difference => difference.map(invertOne).reverse();

/** Applies a difference to the document that it was taken from; the caller vouches that it is that one. */
export const applyDifference = <T>(document: T, difference: Difference): T =>
  difference.reduce<Json>(applyOne, document) as T;
