import { limitValue } from "~/domain/plan-document/sensor";
import { LimitJudging, SensorJudging } from "../../judging";
import { caseFactors, swingFactors, type CaseFactors } from "../../load-cases";
import type { MeasuredState } from "../../measures/measure";
import type { CompiledPlan } from "../../compile";
import { compilePlan } from "../../compile";
import type { PreparedPlan } from "../../prepared-plan";
import { SensorField } from "../../sensor-field";
import type { Circuit } from "~/domain/plan-document/circuit";
import { ORDERS, ordersOf, reordered, type OrderPlace } from "./orders";

/** One limit in one load case, with what each order of each place adds to its groups. */
interface Judged {
  sensor: number;
  bound: number;
  value: (state: MeasuredState) => number;
  present: MeasuredState;
  /** `[place][order]`: change of the groups against the present order. */
  changes: Float64Array[][];
}

/**
 * What phase orders cost at some sensors: the sum of their worst value / limit. Fields are linear in what each set carries, so that
 * every order of every set is computed once and a combination is their sum.
 */
export class OrderCost {
  private readonly judged: Judged[];
  private readonly sensors: number;

  constructor(
    prepared: PreparedPlan,
    targets: readonly number[],
    places: readonly OrderPlace[],
    present: readonly number[],
  ) {
    this.sensors = targets.length;
    this.judged = targets.flatMap((index, sensor) => judgedAt(prepared, index, sensor, places, present));
  }

  of(choice: readonly number[]): number {
    const worst = new Float64Array(this.sensors);
    for (const { sensor, bound, value, present, changes } of this.judged) {
      const groups = Float64Array.from(present.groups);
      choice.forEach((order, place) => {
        const change = changes[place]?.[order];
        if (!change) return;
        for (let i = 0; i < groups.length; i++) groups[i] = (groups[i] as number) + (change[i] as number);
      });
      const used = value({ ...present, groups }) / bound;
      if (used > (worst[sensor] as number)) worst[sensor] = used;
    }
    return worst.reduce((sum, used) => sum + used, 0);
  }
}

function judgedAt(
  prepared: PreparedPlan,
  index: number,
  sensor: number,
  places: readonly OrderPlace[],
  present: readonly number[],
): Judged[] {
  const { plan, earth } = prepared;
  const own = plan.document.sensors[index];
  if (!own) throw new RangeError(`the document has no sensor number ${index}`);
  const at = new SensorJudging(plan, own, earth);
  const fields = places.map(({ circuit, set }, place) =>
    ORDERS.map((_, order) =>
      order === present[place] ? null : orderedField(plan, circuit, set, order, index),
    ),
  );
  const presentFields = new Map(places.map(({ circuit }) => [circuit.id, fieldOf(plan, circuit, index)]));
  return own.limits.flatMap((limit): Judged[] => {
    const judging = new LimitJudging(at, limit);
    // What a limit does not compare costs the same in every order.
    if (!places.some(({ circuit }) => takesPart(judging, circuit.id))) return [];
    const cases = limit.kind === "swing" ? swingFactors(plan) : caseFactors(plan);
    return cases.map((factors) => ({
      sensor,
      bound: limitValue(limit),
      value: judging.measure.value,
      present: judging.stateIn(factors),
      changes: places.map(({ circuit }, place) =>
        (fields[place] ?? []).map((field) =>
          groupChange(judging, factors, circuit.id, field, presentFields.get(circuit.id)),
        ),
      ),
    }));
  });
}

const takesPart = ({ at: { plan }, included }: LimitJudging, circuitId: string): boolean =>
  plan.components.some(({ item }, c) => included[c] && plan.items[item]?.id === circuitId);

function orderedField(
  plan: CompiledPlan,
  circuit: Circuit,
  set: number,
  order: number,
  index: number,
): SensorField {
  const orders = ordersOf(circuit).with(set, ORDERS[order] ?? "abc");
  return fieldOf(plan, reordered(circuit, orders), index);
}

/** The field of one circuit alone, which has its components in the same order as in the whole plan. */
function fieldOf({ document }: CompiledPlan, circuit: Circuit, index: number): SensorField {
  const sensor = document.sensors[index];
  if (!sensor) throw new RangeError(`the document has no sensor number ${index}`);
  const resolved = document.circuits
    .filter(({ id }) => id === circuit.id)
    .map((entry) => ({ ...entry, arrangement: circuit.arrangement }));
  const alone = compilePlan({ ...document, circuits: resolved, equipment: [], loadCases: [] });
  return new SensorField(alone, sensor.position);
}

function groupChange(
  { at: { plan }, included, stride }: LimitJudging,
  factors: CaseFactors,
  circuitId: string,
  changed: SensorField | null,
  present: SensorField | undefined,
): Float64Array {
  const out = new Float64Array(stride * plan.frequencies.groups.length);
  if (!changed || !present) return out;
  const [after, before] =
    stride === 6 ? [changed.phasors, present.phasors] : [changed.gradients, present.gradients];
  let own = 0;
  plan.components.forEach(({ item, group }, c) => {
    if (plan.items[item]?.id !== circuitId) return;
    const from = stride * own++;
    if (!included[c]) return;
    const factor = factors.items[item] as number;
    for (let i = 0; i < stride; i++) {
      const difference = (after[from + i] as number) - (before[from + i] as number);
      out[stride * group + i] = (out[stride * group + i] as number) + factor * difference;
    }
  });
  return out;
}
