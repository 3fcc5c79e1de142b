import { phaseOrder, type Arrangement, type PhaseOrder } from "~/domain/plan-document/arrangement";
import type { Circuit } from "~/domain/plan-document/circuit";

export const ORDERS: readonly PhaseOrder[] = phaseOrder.options;

type Phased = Extract<Arrangement, { kind: "flat" | "trefoil" | "quad" | "flat-n" }>;

/** One set of a circuit, whose phase order can be chosen. */
export interface OrderPlace {
  circuit: Circuit;
  set: number;
}

/** Phase order of each set of a circuit; none where it has no phases to exchange. */
export function ordersOf({ arrangement, supply }: Circuit): PhaseOrder[] {
  if (supply?.kind !== "ac3" || !isPhased(arrangement)) return [];
  const { parallel } = arrangement;
  return parallel?.phaseOrders ?? Array.from({ length: parallel?.sets ?? 1 }, () => "abc" as const);
}

/** The circuit with a phase order for each of its sets. */
export function reordered(circuit: Circuit, phaseOrders: PhaseOrder[]): Circuit {
  const { arrangement } = circuit;
  if (!isPhased(arrangement)) return circuit;
  // One set has no pitch of its own; any length does.
  const pitchM = arrangement.parallel?.pitchM ?? arrangement.spacingM;
  return {
    ...circuit,
    arrangement: { ...arrangement, parallel: { sets: phaseOrders.length, pitchM, phaseOrders } },
  };
}

function isPhased(arrangement: Arrangement): arrangement is Phased {
  const { kind } = arrangement;
  return kind === "flat" || kind === "trefoil" || kind === "quad" || kind === "flat-n";
}
