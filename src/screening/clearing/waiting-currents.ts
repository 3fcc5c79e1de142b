import type { WaitingCurrent } from "~/domain/clearing";
import { circuit as circuitSchema, type Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { CURRENT_LIMIT_A } from "~/domain/plan-document/quantities";
import type { LimitKind } from "~/domain/plan-document/sensor";
import type { Supply } from "~/domain/plan-document/supply";
import { preparePlan } from "../prepared-plan";
import type { Steps } from "../steps";
import { hasStrayByRule } from "./allowable-currents";
import { edge } from "./clear-band";
import { CurrentScaling } from "./current-scaling";

const SMALLEST_A = 1e-3;
const USUAL_HZ = 50;

/**
 * For each circuit that is traced and waits for its current: the current at which each limit of a sensor would be full, uncertainty
 * included. DC where the limit compares DC (in the direction that hurts more), AC at the plan's usual frequency where it
 * compares AC; limits that such a current does not touch are left out. Other waiting circuits carry none meanwhile.
 */
export function* waitingCurrentsOf(document: PlanDocument, index: number): Steps<WaitingCurrent[]> {
  const frequencyHz = usualFrequencyHz(document);
  const out: WaitingCurrent[] = [];
  for (const [number, circuit] of document.circuits.entries()) {
    yield { done: number, total: document.circuits.length };
    if (circuit.supply !== null || (circuit.path === null && circuit.route === null)) continue;
    for (const kind of ["dc", "ac"] as const) {
      const supplied = suppliedCircuit(circuit, kind, frequencyHz);
      if (!supplied) continue;
      const prepared = preparePlan({ ...document, circuits: document.circuits.with(number, supplied) });
      const scaling = new CurrentScaling(prepared, index, circuit.id, hasStrayByRule(circuit));
      (document.sensors[index]?.limits ?? []).forEach((limit, at) => {
        if (!scaling.takesPart(at) || !isJudgedAs(limit.kind, kind)) return;
        const excessAt = (currentA: number) => {
          const ahead = scaling.excessesAt(currentA)[at] ?? 0;
          return kind === "dc" ? Math.max(ahead, scaling.excessesAt(-currentA)[at] ?? 0) : ahead;
        };
        const fullAtA = fullAt(excessAt);
        if (fullAtA === undefined) return;
        out.push({
          circuitId: circuit.id,
          limitId: limit.id,
          kind,
          frequencyHz: kind === "dc" ? 0 : frequencyHz,
          fullAtA,
        });
      });
    }
  }
  return out;
}

/** Null where the budget is full without any; undefined where no current that a plan may carry fills it. */
function fullAt(excessAt: (currentA: number) => number): number | null | undefined {
  const holds = (currentA: number) => excessAt(currentA) <= 1;
  if (!holds(0)) return null;
  let insideA = 0;
  for (let currentA = SMALLEST_A; currentA <= CURRENT_LIMIT_A; currentA *= 2) {
    if (!holds(currentA)) return Number(edge(holds, insideA, currentA).toPrecision(4));
    insideA = currentA;
  }
  return undefined;
}

const isJudgedAs = (limit: LimitKind, kind: "dc" | "ac"): boolean =>
  limit === "range" || (limit === "alternating") === (kind === "ac");

/** The circuit with 1 A of that kind; null where its arrangement takes none. */
function suppliedCircuit(circuit: Circuit, kind: "dc" | "ac", frequencyHz: number): Circuit | null {
  const alternating = { currentA: 1, frequencyHz, phaseDeg: 0, harmonics: [] };
  const supplies: Supply[] =
    kind === "dc"
      ? [{ kind: "dc", currentA: 1 }]
      : [
          { kind: "ac1", ...alternating },
          { kind: "ac3", sequence: "abc", ...alternating },
        ];
  for (const supply of supplies) {
    const parsed = circuitSchema.safeParse({ ...circuit, supply });
    if (parsed.success) return parsed.data;
  }
  return null;
}

/** The fundamental that most circuits of the plan carry. */
function usualFrequencyHz({ circuits }: PlanDocument): number {
  const counts = new Map<number, number>();
  for (const { supply } of circuits) {
    if (supply && supply.kind !== "dc")
      counts.set(supply.frequencyHz, (counts.get(supply.frequencyHz) ?? 0) + 1);
  }
  const [most] = [...counts].sort(([, one], [, other]) => other - one);
  return most?.[0] ?? USUAL_HZ;
}
