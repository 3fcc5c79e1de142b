import { limitValue } from "~/domain/plan-document/sensor";
import { LimitJudging, SensorJudging } from "../judging";
import { caseFactors, swingFactors, type CaseFactors } from "../load-cases";
import type { CompiledPlan } from "../compile";
import type { PreparedPlan } from "../prepared-plan";
import type { CircuitItem } from "../source-item";
import { standardUncertainty } from "../uncertainty/first-order";

/** Coverage factor of expanded uncertainties. */
const COVERAGE = 2;

/**
 * One sensor with the current of one circuit times a factor, all else unchanged. Uncertainties are taken to first order, which
 * the engine replaces by Monte Carlo where it must: what is found here is for the engine to confirm.
 */
export class CurrentScaling {
  private readonly known = new Map<number, number[]>();
  private readonly base: LimitJudging[];
  private readonly item: number;
  /** Whether the whole circuit follows its supply's current, so that a factor on it is a load factor. */
  private readonly followsCurrent: boolean;
  private readonly scalesStray: boolean;

  constructor(
    private readonly prepared: PreparedPlan,
    private readonly index: number,
    circuitId: string,
    /** Whether the bound of the unstated stray current is a share of the current. */
    strayByRule: boolean,
  ) {
    const { plan } = prepared;
    this.item = plan.items.findIndex(({ id, kind }) => kind === "circuit" && id === circuitId);
    const source = this.circuit;
    const statesStray = (source.circuit.strayCurrentA ?? 0) !== 0;
    this.scalesStray = strayByRule;
    this.followsCurrent = !statesStray && (strayByRule || source.circuit.strayToleranceA === 0);
    this.base = this.judgingsOf(plan);
  }

  /** Whether the circuit takes part in what the limit at that place compares. */
  takesPart(limit: number): boolean {
    const { plan } = this.prepared;
    return plan.components.some(({ item }, c) => item === this.item && this.base[limit]?.included[c]);
  }

  /** (value + U) / limit of each limit, at its worst load case; without U where the value alone is above the limit. */
  excessesAt(factor: number): number[] {
    const known = this.known.get(factor);
    if (known) return known;
    const excesses = this.followsCurrent
      ? this.base.map((judging) => excessOf(judging, (cases) => this.scaledCases(cases, factor)))
      : this.judgingsOf(this.scaledPlan(factor)).map((judging) => excessOf(judging, (cases) => cases));
    this.known.set(factor, excesses);
    return excesses;
  }

  private get circuit(): CircuitItem {
    const source = this.prepared.plan.items[this.item];
    if (source?.kind !== "circuit") throw new RangeError("only a traced circuit with a current is scaled");
    return source;
  }

  private judgingsOf(plan: CompiledPlan): LimitJudging[] {
    const sensor = plan.document.sensors[this.index];
    if (!sensor) throw new RangeError(`the document has no sensor number ${this.index}`);
    const judging = new SensorJudging(plan, sensor, this.prepared.earth);
    return sensor.limits.map((limit) => new LimitJudging(judging, limit));
  }

  private scaledCases(cases: CaseFactors[], factor: number): CaseFactors[] {
    return cases.map((entry) => ({
      ...entry,
      items: entry.items.map((value, item) => (item === this.item ? value * factor : value)),
    }));
  }

  private scaledPlan(factor: number): CompiledPlan {
    const { plan } = this.prepared;
    const source = this.circuit;
    const drives = source.drives.map((drive) => ({
      ...drive,
      currents: drive.currents.map((value, i) => {
        const follows = drive.scaling[i] as number;
        return value - follows + factor * follows;
      }),
      scaling: drive.scaling.map((value) => value * factor),
    }));
    const strayShare = this.scalesStray ? Math.abs(factor) : 1;
    const strayToleranceA = source.circuit.strayToleranceA * strayShare;
    const scaled: CircuitItem = { ...source, drives, circuit: { ...source.circuit, strayToleranceA } };
    const components = plan.components.map((component) => {
      const drive = component.item === this.item ? drives[source.drives.indexOf(component.drive)] : undefined;
      return drive ? { ...component, drive } : component;
    });
    return { ...plan, items: plan.items.with(this.item, scaled), components };
  }
}

function excessOf(judging: LimitJudging, scaled: (cases: CaseFactors[]) => CaseFactors[]): number {
  const { limit, at } = judging;
  const bound = limitValue(limit);
  const isSwing = limit.kind === "swing";
  const cases = scaled(isSwing ? swingFactors(at.plan) : caseFactors(at.plan));
  const states = cases.map((factors) => {
    const state = judging.stateIn(factors);
    return { factors, state, value: judging.measure.value(state) };
  });
  const greatest = states.reduce((best, next) => (next.value > best.value ? next : best));
  if (greatest.value > bound) return greatest.value / bound;
  // Of a swing only the largest difference is judged.
  const judged = isSwing ? [greatest] : states;
  return judged.reduce((most, { factors, state, value }) => {
    const measured = judging.measure.measure(state);
    const expanded = COVERAGE * standardUncertainty(judging, factors, state, measured);
    return Math.max(most, (value + expanded) / bound);
  }, 0);
}
