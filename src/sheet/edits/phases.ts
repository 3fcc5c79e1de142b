import type { Circuit } from "~/domain/plan-document/circuit";
import { sumOfLines, supplyCurrents } from "~/domain/plan-document/phasors";
import type { Supply } from "~/domain/plan-document/supply";
import { degrees } from "~/domain/units";

type ThreePhase = Extract<Supply, { kind: "ac3" }>;
export type Phases = NonNullable<ThreePhase["phases"]>;

/** Phases one by one as they are while balanced, to be changed from there. */
export function phasesOf({ currentA, phases }: ThreePhase): Phases {
  if (phases !== undefined) return phases;
  const each = currentA ?? 0;
  return [
    { currentA: each, angleDeg: 0 },
    { currentA: each, angleDeg: -120 },
    { currentA: each, angleDeg: 120 },
  ];
}

const without = (supply: ThreePhase) => {
  const { kind, frequencyHz, phaseDeg, harmonics, sequence } = supply;
  return { kind, frequencyHz, phaseDeg, harmonics, sequence };
};

export const withPhases = (supply: ThreePhase, phases: Phases): ThreePhase => ({
  ...without(supply),
  phases,
});

/** Balanced again, with the current of the first phase. */
export const balanced = (supply: ThreePhase): ThreePhase => ({
  ...without(supply),
  currentA: phasesOf(supply)[0].currentA,
});

/** What the phases leave over at the fundamental, declared as the circuit's stray current. */
export function withSumAsStray(circuit: Circuit): Circuit {
  const [first] = circuit.supply === null ? [] : supplyCurrents(circuit.supply);
  if (first === undefined) return circuit;
  const { re, im } = sumOfLines(first);
  return {
    ...circuit,
    strayCurrentA: Number(Math.hypot(re, im).toPrecision(9)),
    strayAngleDeg: Number(degrees(Math.atan2(im, re)).toFixed(6)),
  };
}
