import type { Supply } from "~/domain/plan-document/supply";

/** The supply with its currents times a factor; harmonics keep their share. A negative factor turns DC round. */
export function scaledSupply(supply: Supply, factor: number): Supply {
  if (supply.kind !== "ac3") return { ...supply, currentA: supply.currentA * factor };
  if (!supply.phases) return { ...supply, currentA: (supply.currentA ?? 0) * factor };
  const [a, b, c] = supply.phases;
  const scaled = (phase: typeof a) => ({ ...phase, currentA: phase.currentA * factor });
  return { ...supply, phases: [scaled(a), scaled(b), scaled(c)] };
}
