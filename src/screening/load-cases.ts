import type { CompiledPlan } from "./compile";

/** The factor of every item (and bound) in one load case, or the difference of two for swing. */
export interface CaseFactors {
  /** Null where the document has no load cases, and for differences. */
  id: string | null;
  items: Float64Array;
  bounds: Float64Array;
}

/** All load cases in the document's order, or the one as entered; made once a plan. */
export function caseFactors(plan: CompiledPlan): CaseFactors[] {
  let cases = knownCases.get(plan);
  if (!cases) {
    const { loadCases } = plan.document;
    cases =
      loadCases.length === 0
        ? [factorsBy(plan, null, () => 1)]
        : loadCases.map(({ id, factors }) => factorsBy(plan, id, (item) => factors[item] ?? 1));
    knownCases.set(plan, cases);
  }
  return cases;
}

const knownCases = new WeakMap<CompiledPlan, CaseFactors[]>();
const knownDistinct = new WeakMap<CompiledPlan, Map<string, CaseFactors[]>>();

/**
 * The load cases that differ in what is included, the first listed of those that do not; made once for every set of frequencies
 * that is included.
 */
export function distinctCases(plan: CompiledPlan, includes: (frequencyHz: number) => boolean): CaseFactors[] {
  const frequencies = [...new Set(plan.components.map(({ drive }) => drive.frequencyHz))];
  const key = frequencies.filter(includes).join();
  const known = knownDistinct.get(plan) ?? new Map<string, CaseFactors[]>();
  knownDistinct.set(plan, known);
  const found = known.get(key);
  if (found) return found;
  const items = [
    ...new Set(plan.components.flatMap(({ item, drive }) => (includes(drive.frequencyHz) ? [item] : []))),
  ];
  const seen = new Set<string>();
  const distinct = caseFactors(plan).filter((factors) => {
    const values = [...items.map((item) => factors.items[item]), ...factors.bounds].join();
    if (seen.has(values)) return false;
    seen.add(values);
    return true;
  });
  known.set(key, distinct);
  return distinct;
}

/** Every pair of load cases, "everything off" among them, as the difference of their factors: DC is linear in them. */
export function swingFactors(plan: CompiledPlan): CaseFactors[] {
  const states = switchedStates(plan);
  return states.flatMap((one, index) => states.slice(index + 1).map((other) => differenceOf(one, other)));
}

/**
 * The pair whose difference is the largest in a limit's quantity. `valueOf` measures a difference of group vectors and bounds; every
 * state's groups are formed once, as `groupsIn` gives them.
 */
export function largestSwing(
  plan: CompiledPlan,
  groupsIn: (factors: CaseFactors) => Float64Array,
  valueOf: (groups: Float64Array, factors: CaseFactors) => number,
): CaseFactors {
  const states = switchedStates(plan);
  const groups = states.map(groupsIn);
  let best: { pair: [CaseFactors, CaseFactors]; value: number } | null = null;
  for (const [i, one] of states.entries()) {
    for (const [j, other] of states.entries()) {
      if (j <= i) continue;
      const change = (groups[j] as Float64Array).map((value, k) => value - (groups[i]?.[k] as number));
      const bounds = other.bounds.map((factor, bound) => Math.abs(factor - (one.bounds[bound] as number)));
      const value = valueOf(change, { id: null, items: other.items, bounds });
      if (!best || value > best.value) best = { pair: [one, other], value };
    }
  }
  const [one, other] = best?.pair ?? [];
  return one && other ? differenceOf(one, other) : factorsBy(plan, null, () => 0);
}

/** Everything off, then the load cases; the factors of bounds keep their signs here. */
function switchedStates(plan: CompiledPlan): CaseFactors[] {
  const { loadCases } = plan.document;
  const signed = (factorOf: (id: string) => number): CaseFactors => ({
    ...factorsBy(plan, null, factorOf),
    bounds: Float64Array.from(plan.bounds, (bound) => factorOf(bound.id)),
  });
  const states =
    loadCases.length > 0
      ? loadCases.map(({ factors }) => signed((id) => factors[id] ?? 1))
      : [signed(() => 1)];
  return [signed(() => 0), ...states];
}

function differenceOf(one: CaseFactors, other: CaseFactors): CaseFactors {
  return {
    id: null,
    items: other.items.map((factor, item) => factor - (one.items[item] as number)),
    bounds: other.bounds.map((factor, bound) => Math.abs(factor - (one.bounds[bound] as number))),
  };
}

function factorsBy(plan: CompiledPlan, id: string | null, factorOf: (id: string) => number): CaseFactors {
  return {
    id,
    items: Float64Array.from(plan.items, (item) => factorOf(item.id)),
    bounds: Float64Array.from(plan.bounds, (bound) => Math.abs(factorOf(bound.id))),
  };
}
