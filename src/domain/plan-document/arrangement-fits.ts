import { radians } from "../units";
import type { Arrangement, Carrier } from "./arrangement";
import { largestCurrentA, phasor, sumOfLines, supplyCurrents } from "./phasors";
import type { Supply, SupplyKind } from "./supply";

interface FittedCircuit {
  arrangement: Arrangement;
  conductorRadiusM: number;
  supply: Supply | null;
  strayCurrentA: number | null;
  strayAngleDeg: number;
  strayToleranceA: number | null;
}

interface Fault {
  path: (string | number)[];
  message: string;
}

const FITTING: Record<Exclude<Arrangement["kind"], "custom">, readonly SupplyKind[]> = {
  single: ["dc", "ac1"],
  pair: ["dc", "ac1"],
  "twisted-pair": ["dc", "ac1"],
  flat: ["ac3"],
  trefoil: ["ac3"],
  quad: ["ac3"],
  "flat-n": ["ac3"],
};

const ONE_PHASE: readonly Carrier[] = ["go", "return"];
const THREE_PHASE: readonly Carrier[] = ["a", "b", "c", "n"];

/** Whether one conductor only carries the circuit, so that its way back is another circuit or an open end. */
export function isSingle(arrangement: Arrangement): boolean {
  return (
    arrangement.kind === "single" || (arrangement.kind === "custom" && arrangement.conductors.length === 1)
  );
}

/** The conductor that carries what comes back: return, neutral or, where there is none, null. */
export function wayBack(arrangement: Arrangement): "return" | "n" | null {
  switch (arrangement.kind) {
    case "pair":
    case "twisted-pair":
      return "return";
    case "quad":
    case "flat-n":
      return "n";
    case "custom":
      if (arrangement.conductors.some((conductor) => conductor.of === "return")) return "return";
      return arrangement.conductors.some((conductor) => conductor.of === "n") ? "n" : null;
    default:
      return null;
  }
}

/** Why a circuit's arrangement, radius, supply and stray current do not go together; paths start at the circuit. */
export function arrangementFaults(circuit: FittedCircuit): Fault[] {
  return [
    ...spacingFaults(circuit),
    ...customFaults(circuit.arrangement),
    ...supplyFaults(circuit),
    ...strayFaults(circuit),
  ];
}

function spacingFaults({ arrangement, conductorRadiusM }: FittedCircuit): Fault[] {
  if (!("spacingM" in arrangement) || arrangement.spacingM >= 2 * conductorRadiusM * (1 - 1e-9)) return [];
  const message = `conductors of radius ${conductorRadiusM} m would overlap; the spacing is at least ${2 * conductorRadiusM} m, axis to axis`;
  return [{ path: ["arrangement", "spacingM"], message }];
}

function customFaults(arrangement: Arrangement): Fault[] {
  if (arrangement.kind !== "custom") return [];
  const path = ["arrangement", "conductors"];
  const fractions = new Map<Carrier, number>();
  for (const { of, fraction } of arrangement.conductors)
    fractions.set(of, (fractions.get(of) ?? 0) + fraction);
  const faults = [...fractions]
    .filter(([, sum]) => Math.abs(sum - 1) > 1e-6)
    .map(([of, sum]) => ({
      path,
      message: `the fractions of ${of} add up to ${Number(sum.toPrecision(6))}, not 1`,
    }));
  if (ONE_PHASE.some((of) => fractions.has(of)) && THREE_PHASE.some((of) => fractions.has(of))) {
    faults.push({ path, message: "conductors carry either go and return, or a, b, c and n, not both" });
  }
  return faults;
}

function supplyFaults({ arrangement, supply }: FittedCircuit): Fault[] {
  if (!supply) return [];
  if (arrangement.kind !== "custom") {
    const fitting = FITTING[arrangement.kind];
    if (fitting.includes(supply.kind)) return [];
    const message = `${arrangement.kind} does not fit a ${supply.kind} supply; it takes ${fitting.join(" or ")}`;
    return [{ path: ["arrangement", "kind"], message }];
  }
  const needed: readonly Carrier[] = supply.kind === "ac3" ? ["a", "b", "c"] : ["go"];
  const allowed = supply.kind === "ac3" ? THREE_PHASE : ONE_PHASE;
  const present = new Set(arrangement.conductors.map((conductor) => conductor.of));
  const missing = needed.filter((of) => !present.has(of));
  const foreign = [...present].filter((of) => !allowed.includes(of));
  const path = ["arrangement", "conductors"];
  return [
    ...missing.map((of) => ({ path, message: `no conductor carries ${of} of the ${supply.kind} supply` })),
    ...foreign.map((of) => ({ path, message: `the ${supply.kind} supply has no ${of}` })),
  ];
}

function strayFaults(circuit: FittedCircuit): Fault[] {
  const { arrangement, supply, strayCurrentA, strayAngleDeg, strayToleranceA } = circuit;
  if (isSingle(arrangement)) {
    const message = "a single conductor takes no stray current: draw its way back as a circuit of its own";
    const faults: Fault[] = [];
    if (strayCurrentA) faults.push({ path: ["strayCurrentA"], message });
    if (strayToleranceA) faults.push({ path: ["strayToleranceA"], message });
    return faults;
  }
  if (!supply) return [];
  if (supply.kind === "dc" && strayAngleDeg !== 0) {
    return [{ path: ["strayAngleDeg"], message: "the stray current of a DC circuit has no angle; give 0" }];
  }
  if (supplyFaults(circuit).length > 0 || wayBack(arrangement)) return [];
  return balanceFaults(supply, phasor(strayCurrentA ?? 0, radians(strayAngleDeg)));
}

function balanceFaults(supply: Supply, stray: { re: number; im: number }): Fault[] {
  const allowedA = 1e-3 * largestCurrentA(supply);
  return supplyCurrents(supply).flatMap((entry) => {
    const sum = sumOfLines(entry);
    const declared = entry.order <= 1 ? stray : { re: 0, im: 0 };
    if (Math.hypot(sum.re - declared.re, sum.im - declared.im) <= allowedA) return [];
    // What rounding leaves of a balanced sum is nought to whoever reads this.
    const whole = Math.hypot(sum.re, sum.im) < 1e-9 * largestCurrentA(supply) ? { re: 0, im: 0 } : sum;
    const sumA = Number(Math.hypot(whole.re, whole.im).toPrecision(6));
    const angleDeg = Number(((Math.atan2(whole.im, whole.re) * 180) / Math.PI).toFixed(2));
    const sumText = entry.order === 0 ? `${Number(whole.re.toPrecision(6))} A` : `${sumA} A at ${angleDeg}°`;
    const declaredA = Number(Math.hypot(declared.re, declared.im).toPrecision(6));
    const message =
      declaredA > 0
        ? `the conductors' currents add up to ${sumText} (${entry.frequencyHz} Hz), but strayCurrentA declares ` +
          `${declaredA} A of them to come back elsewhere; make the phases add up to it, or correct strayCurrentA`
        : `the conductors' currents add up to ${sumText} (${entry.frequencyHz} Hz) and none of them carries it back; ` +
          "add a neutral or return, or declare it as strayCurrentA";
    return [{ path: ["supply"], message }];
  });
}
