import { pathText } from "./faults";
import type { DocumentFault } from "./faults";
import { MAX_CIRCUITS, MAX_LOAD_CASES, MAX_SENSORS } from "./plan-document";

/** Deepest nesting of a document; a valid one needs ten levels. */
const MAX_DEPTH = 100;
/** Longest list anywhere, and most keys of one object. */
const MAX_ENTRIES = 20_000;
const RESERVED = "__proto__";
/** Longest path told. */
const MAX_PATH = 8;
/** Values in one entry of the plan's lists (a route, a circuit, a sensor) and in all that only the drawing needs. */
const MAX_ENTRY_VALUES = 100_000;
const MAX_DRAWING_VALUES = 500_000;

const MOST_LISTED: Readonly<Record<string, number>> = {
  routes: MAX_CIRCUITS,
  circuits: MAX_CIRCUITS,
  equipment: MAX_CIRCUITS,
  loadCases: MAX_LOAD_CASES,
  sensors: MAX_SENSORS,
};

/** A list or an object of the document. */
interface Node {
  value: object;
  depth: number;
  parent: Node | null;
  key: string | number;
  /** How many values its branch holds so far. */
  branch: { values: number; most: number };
}

export interface DocumentSize {
  faults: DocumentFault[];
  /** Numbers, texts, lists and objects in the document. */
  values: number;
}

/**
 * Measures JSON before any of it is judged, so that judging a monstrous document takes bounded time and memory: depth, lengths of
 * lists, and values of each branch. Walks without recursion, and stops at the first thing that is too much. Keys that the
 * schemas would pass over in silence are refused here.
 */
export function sizeOf(json: unknown): DocumentSize {
  const whole = { values: 0, most: Infinity };
  if (!isNode(json)) return { faults: [], values: 1 };
  const waiting: Node[] = [{ value: json, depth: 0, parent: null, key: "", branch: whole }];
  for (let node = waiting.pop(); node !== undefined; node = waiting.pop()) {
    // A record passes over this key in silence.
    if (Object.hasOwn(node.value, RESERVED))
      return refused(whole, [...pathOf(node), RESERVED], "this key is reserved; remove it");
    const message = faultOf(node) ?? countChildren(node, whole, waiting);
    if (message !== null) return refused(whole, pathOf(node), message);
  }
  return { faults: [], values: whole.values };
}

const refused = (whole: Node["branch"], path: (string | number)[], message: string): DocumentSize => ({
  faults: [{ path: pathText(path), message }],
  values: whole.values,
});

const isNode = (value: unknown): value is object => typeof value === "object" && value !== null;

function faultOf({ value, depth, key }: Node): string | null {
  if (depth >= MAX_DEPTH) return `is nested deeper than ${MAX_DEPTH} levels`;
  const entries = Array.isArray(value) ? value.length : Object.keys(value).length;
  if (entries > MAX_ENTRIES) return tooLong(depth === 1 ? String(key) : "", entries);
  return null;
}

function countChildren(node: Node, whole: Node["branch"], waiting: Node[]): string | null {
  const { value, depth } = node;
  const keys = Array.isArray(value) ? null : Object.keys(value);
  const children: unknown[] = Array.isArray(value) ? value : Object.values(value);
  whole.values += children.length;
  for (const [index, child] of children.entries()) {
    if (!isNode(child)) continue;
    const key = keys?.[index] ?? index;
    waiting.push({ value: child, depth: depth + 1, parent: node, key, branch: branchOf(node, child, key) });
  }
  if (depth === 0) return null;
  node.branch.values += children.length;
  if (node.branch.values <= node.branch.most) return null;
  return `holds more than ${node.branch.most} values; split it, or draw it with fewer points`;
}

/** Every entry of a list of the document is a branch, and so is whatever else stands in the document itself. */
function branchOf({ depth, branch }: Node, child: object, key: string | number): Node["branch"] {
  if (depth === 0 && key === "drawing") return { values: 0, most: MAX_DRAWING_VALUES };
  if (depth === 0) return { values: 0, most: Array.isArray(child) ? Infinity : MAX_ENTRY_VALUES };
  return depth === 1 && branch.most === Infinity ? { values: 0, most: MAX_ENTRY_VALUES } : branch;
}

/** Deep paths are cut to where the trouble begins. */
function pathOf(node: Node): (string | number)[] {
  const path: (string | number)[] = [];
  for (let at: Node | null = node; at?.parent; at = at.parent) path.unshift(at.key);
  return path.slice(0, MAX_PATH);
}

function tooLong(list: string, entries: number): string {
  const most = MOST_LISTED[list];
  if (most !== undefined) return `${entries} of them; at most ${most} ${list}. Split the plan by area`;
  return `has ${entries} entries; a list or object has at most ${MAX_ENTRIES}`;
}
