import { radians } from "../units";
import type { Carrier } from "./arrangement";
import type { Supply } from "./supply";

/** Root-mean-square phasor, amperes, e^{+jωt}; DC has a signed real value. */
export interface Phasor {
  re: number;
  im: number;
}

/** The currents of a supply at one frequency, by what carries them; carriers without an entry carry none. */
export interface FrequencyCurrents {
  frequencyHz: number;
  /** 0 for DC, 1 for the fundamental, the order for a harmonic. */
  order: number;
  currents: Partial<Record<Carrier, Phasor>>;
}

export const phasor = (rmsA: number, angleRad: number): Phasor => ({
  re: rmsA * Math.cos(angleRad),
  im: rmsA * Math.sin(angleRad),
});

/**
 * Currents in the go conductor or the phases, one entry per frequency, fundamental (or DC) first.
 * Ways back (return, neutral) are not in it: they are minus the sum, see `conductorCurrents`.
 */
export function supplyCurrents(supply: Supply): FrequencyCurrents[] {
  if (supply.kind === "dc") {
    return [{ frequencyHz: 0, order: 0, currents: { go: { re: supply.currentA, im: 0 } } }];
  }
  const lines = linesOf(supply);
  const at = (order: number, share: number, angleRad: number): FrequencyCurrents => ({
    frequencyHz: supply.frequencyHz * order,
    order,
    currents: Object.fromEntries(
      lines.map(({ carrier, rmsA, angleRad: lineRad }) => [
        carrier,
        phasor(rmsA * share, order * lineRad + angleRad),
      ]),
    ),
  });
  return [at(1, 1, 0), ...supply.harmonics.map((h) => at(h.order, h.percent / 100, radians(h.angleDeg)))];
}

/** Largest rms current of any line at the fundamental, amperes. */
export function largestCurrentA(supply: Supply): number {
  if (supply.kind === "ac3") {
    return supply.phases ? Math.max(...supply.phases.map((p) => p.currentA)) : (supply.currentA ?? 0);
  }
  return Math.abs(supply.currentA);
}

/** Sum of the line currents at one frequency, amperes. */
export function sumOfLines(entry: FrequencyCurrents): Phasor {
  return Object.values(entry.currents).reduce<Phasor>(
    (sum, current) => ({ re: sum.re + current.re, im: sum.im + current.im }),
    { re: 0, im: 0 },
  );
}

interface Line {
  carrier: Carrier;
  rmsA: number;
  angleRad: number;
}

function linesOf(supply: Exclude<Supply, { kind: "dc" }>): Line[] {
  const turnRad = radians(supply.phaseDeg);
  if (supply.kind === "ac1") return [{ carrier: "go", rmsA: supply.currentA, angleRad: turnRad }];
  const balanced = [0, -120, 120].map((angleDeg) => ({ currentA: supply.currentA ?? 0, angleDeg }));
  const [first, second, third] = supply.phases ?? balanced;
  const ordered = supply.sequence === "abc" ? [first, second, third] : [first, third, second];
  const carriers: Carrier[] = ["a", "b", "c"];
  return carriers.map((carrier, index) => ({
    carrier,
    rmsA: ordered[index]?.currentA ?? 0,
    angleRad: turnRad + radians(ordered[index]?.angleDeg ?? 0),
  }));
}
