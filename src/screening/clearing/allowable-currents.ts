import type { AllowableCurrent } from "~/domain/clearing";
import { largestCurrentA } from "~/domain/plan-document/phasors";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { SensorResult } from "~/domain/screening-result";
import { preparePlan, screenSensor, type PreparedPlan } from "../prepared-plan";
import type { Steps } from "../steps";
import { clearBands, type ClearBands } from "./clear-band";
import { CurrentScaling } from "./current-scaling";
import { scaledSupply } from "./scaled-supply";

/** Digits that a current is given with, always rounded to the safe side. */
const DIGITS = 4;
const CONFIRMATIONS = 14;

/**
 * The current of each circuit alone at which each flagged limit, and at which all limits together (limitId null), hold with their
 * uncertainty. Circuits that take no part in a limit are left out of it; every figure was confirmed by the engine.
 */
export function* allowableCurrentsOf(
  document: PlanDocument,
  prepared: PreparedPlan,
  index: number,
  result: SensorResult,
): Steps<AllowableCurrent[]> {
  const limits = prepared.resolved.sensors[index]?.limits ?? [];
  const flagged = result.findings.flatMap(({ verdict }, limit) => (verdict === "within" ? [] : [limit]));
  const out: AllowableCurrent[] = [];
  for (const [number, circuit] of document.circuits.entries()) {
    yield { done: number, total: document.circuits.length };
    const presentA = circuit.supply ? largestCurrentA(circuit.supply) : 0;
    const isDrawn = prepared.plan.items.some(({ id }) => id === circuit.id);
    if (!isDrawn || presentA === 0) continue;
    const scaling = new CurrentScaling(prepared, index, circuit.id, hasStrayByRule(circuit));
    const engine = new Engine(document, number, index);
    const concerned = flagged.filter((limit) => scaling.takesPart(limit));
    if (concerned.length === 0) continue;
    const ask = (of: number[], limitId: string | null) =>
      answer(
        circuit,
        presentA,
        limitId,
        engine,
        of,
        clearBands((f) => worstOf(scaling.excessesAt(f), of)),
      );
    for (const limit of concerned) out.push(ask([limit], limits[limit]?.id ?? null));
    if (limits.length > 1)
      out.push(
        ask(
          limits.map((_, i) => i),
          null,
        ),
      );
    else out.push({ ...(out[out.length - 1] as AllowableCurrent), limitId: null });
  }
  return out;
}

export const hasStrayByRule = ({ strayToleranceA, strayCurrentA }: Circuit): boolean =>
  strayToleranceA === null && strayCurrentA === null;

const worstOf = (excesses: readonly number[], of: readonly number[]): number =>
  of.reduce((most, limit) => Math.max(most, excesses[limit] ?? 0), 0);

/** The full engine on the document with one circuit's current changed. */
class Engine {
  constructor(
    private readonly document: PlanDocument,
    private readonly circuit: number,
    private readonly sensor: number,
  ) {}

  holds(factor: number, of: readonly number[]): boolean {
    const circuit = this.document.circuits[this.circuit];
    if (!circuit?.supply) return false;
    const circuits = this.document.circuits.with(this.circuit, {
      ...circuit,
      supply: scaledSupply(circuit.supply, factor),
    });
    const { findings } = screenSensor(preparePlan({ ...this.document, circuits }), this.sensor).result;
    return of.every((limit) => {
      const finding = findings[limit];
      return finding !== undefined && finding.value + finding.expandedUncertainty <= finding.limit;
    });
  }
}

function answer(
  circuit: Circuit,
  presentA: number,
  limitId: string | null,
  engine: Engine,
  of: readonly number[],
  { fromZero, nearest }: ClearBands,
): AllowableCurrent {
  const base = { circuitId: circuit.id, limitId, presentA };
  const factor = confirmed(engine, of, fromZero?.to ?? 0, presentA);
  const atMost = factor === null ? null : { currentA: rounded(factor * presentA), factor };
  if (fromZero !== null || nearest === null) return { ...base, atMost, between: null };
  const middle = (nearest.from + nearest.to) / 2;
  const holds = [nearest.to, middle, nearest.from].every((f) => engine.holds(f, of));
  const between = holds
    ? { fromA: nearest.from * presentA, toA: nearest.to * presentA, toFactor: nearest.to }
    : null;
  return { ...base, atMost, between };
}

const rounded = (currentA: number): number => Number(currentA.toPrecision(DIGITS));

function flooredFactor(factor: number, presentA: number): number {
  const currentA = factor * presentA;
  const step = 10 ** (Math.floor(Math.log10(Math.max(currentA, 1e-12))) + 1 - DIGITS);
  return rounded(Math.floor(currentA / step) * step) / presentA;
}

/** The largest factor up to the one found that the engine confirms down from it; null where it does not even at zero. */
function confirmed(engine: Engine, of: readonly number[], found: number, presentA: number): number | null {
  const factor = flooredFactor(found, presentA);
  if (engine.holds(factor, of)) return factor;
  if (found === 0 || !engine.holds(0, of)) return null;
  let [good, bad] = [0, factor];
  for (let i = 0; i < CONFIRMATIONS; i++) {
    const middle = (good + bad) / 2;
    if (engine.holds(middle, of)) good = middle;
    else bad = middle;
  }
  const floored = flooredFactor(good, presentA);
  return engine.holds(floored, of) ? floored : 0;
}
