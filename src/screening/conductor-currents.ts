import { wayBack } from "~/domain/plan-document/arrangement-fits";
import type { Carrier } from "~/domain/plan-document/arrangement";
import { phasor, sumOfLines, supplyCurrents, type Phasor } from "~/domain/plan-document/phasors";
import type { ResolvedCircuit } from "~/domain/plan-document/resolved";
import type { Supply } from "~/domain/plan-document/supply";
import { radians } from "~/domain/units";

/** Currents of a circuit's conductors at one frequency, rms phasors (A), 0 Hz for DC. */
export interface ConductorCurrents {
  frequencyHz: number;
  /** 0 for DC, 1 for the fundamental, the order for a harmonic. */
  order: number;
  /** What follows the supply's current, ways back included. */
  supply: Partial<Record<Carrier, Phasor>>;
  /** What the stated stray current takes from the way back; fixed, whatever the current's tolerance. */
  stray: Partial<Record<Carrier, Phasor>>;
}

/** Adds the way back to a supply's currents: neutral or return = −Σ + stray, the stray part at the fundamental only. */
export function conductorCurrents(circuit: ResolvedCircuit, supply: Supply): ConductorCurrents[] {
  const back = wayBack(circuit.arrangement);
  return supplyCurrents(supply).map((entry) => {
    const { frequencyHz, order, currents } = entry;
    if (!back) return { frequencyHz, order, supply: currents, stray: {} };
    const sum = sumOfLines(entry);
    const stray = order <= 1 ? strayOf(circuit) : null;
    return {
      frequencyHz,
      order,
      supply: { ...currents, [back]: { re: -sum.re, im: -sum.im } },
      stray: stray ? { [back]: stray } : {},
    };
  });
}

function strayOf({ strayCurrentA, strayAngleDeg }: ResolvedCircuit): Phasor | null {
  return strayCurrentA ? phasor(strayCurrentA, radians(strayAngleDeg)) : null;
}
