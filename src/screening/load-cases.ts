import type { CompiledPlan } from "./compile";

/** The factor of every item (and bound) in one load case, or the difference of two for swing. */
export interface CaseFactors {
  /** Null where the document has no load cases, and for differences. */
  id: string | null;
  items: Float64Array;
  bounds: Float64Array;
}

export function caseFactors(plan: CompiledPlan): CaseFactors[] {
  const { loadCases } = plan.document;
  if (loadCases.length === 0) return [factorsBy(plan, null, () => 1)];
  return loadCases.map(({ id, factors }) => factorsBy(plan, id, (item) => factors[item] ?? 1));
}

/** Every pair of load cases, "everything off" among them, as the difference of their factors: DC is linear in them. */
export function swingFactors(plan: CompiledPlan): CaseFactors[] {
  const off = factorsBy(plan, null, () => 0);
  const states = [off, ...caseFactors(plan)];
  return states.flatMap((one, index) =>
    states.slice(index + 1).map((other) => ({
      id: null,
      items: other.items.map((factor, item) => factor - (one.items[item] as number)),
      bounds: other.bounds.map((factor, bound) => Math.abs(factor - (one.bounds[bound] as number))),
    })),
  );
}

function factorsBy(plan: CompiledPlan, id: string | null, factorOf: (id: string) => number): CaseFactors {
  return {
    id,
    items: Float64Array.from(plan.items, (item) => factorOf(item.id)),
    bounds: Float64Array.from(plan.bounds, (bound) => Math.abs(factorOf(bound.id))),
  };
}
