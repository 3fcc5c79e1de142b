import { applyDifference, differenceOf, invert, type Difference } from "./difference";

/** One checkpoint: what was done, in words for the undo button, and how the document differs by it. */
export interface Entry {
  label: string;
  difference: Difference;
}

/** Differences between checkpoints, oldest first; `future` holds what was undone, next first. */
export interface History {
  past: readonly Entry[];
  future: readonly Entry[];
}

export const emptyHistory: History = { past: [], future: [] };

/** Adds a checkpoint from `before` to `after`. A checkpoint that changes nothing is not kept. */
export function record(history: History, label: string, before: unknown, after: unknown): History {
  const difference = differenceOf(before, after);
  if (difference.length === 0) return history;
  return { past: [...history.past, { label, difference }], future: [] };
}

/** Adds to the last checkpoint, which led to `before`, what leads on to `after`: both are undone at once. */
export function extend(history: History, label: string, before: unknown, after: unknown): History {
  const last = history.past.at(-1);
  if (last === undefined) return record(history, label, before, after);
  const shortened = { past: history.past.slice(0, -1), future: [] };
  return record(shortened, label, applyDifference(before, invert(last.difference)), after);
}

export interface Stepped<T> {
  document: T;
  history: History;
  label: string;
}

/** @returns null when there is nothing to undo. */
export function undo<T>(history: History, document: T): Stepped<T> | null {
  const entry = history.past.at(-1);
  if (entry === undefined) return null;
  return {
    document: applyDifference(document, invert(entry.difference)),
    history: { past: history.past.slice(0, -1), future: [entry, ...history.future] },
    label: entry.label,
  };
}

/** @returns null when there is nothing to redo. */
export function redo<T>(history: History, document: T): Stepped<T> | null {
  const [entry, ...future] = history.future;
  if (entry === undefined) return null;
  return {
    document: applyDifference(document, entry.difference),
    history: { past: [...history.past, entry], future },
    label: entry.label,
  };
}
