import type { Circuit } from "./plan-document/circuit";
import type { PlanDocument } from "./plan-document/plan-document";

/** A circuit that spends nothing yet because something of it is not known; while there is one, no verdict is better than undecided. */
export interface WaitingCircuit {
  circuit: Circuit;
  isTraced: boolean;
  isCurrentKnown: boolean;
}

export function waitingCircuits(document: Pick<PlanDocument, "circuits">): WaitingCircuit[] {
  return document.circuits
    .map((circuit) => ({
      circuit,
      isTraced: circuit.path !== null || circuit.route !== null,
      isCurrentKnown: circuit.supply !== null,
    }))
    .filter(({ isTraced, isCurrentKnown }) => !isTraced || !isCurrentKnown);
}

/** What is missing: "not traced yet", "its current is not known", or both. */
export function waitingWords({ isTraced, isCurrentKnown }: WaitingCircuit): string {
  if (isTraced) return "its current is not known";
  return isCurrentKnown ? "not traced yet" : "not traced yet, its current is not known";
}
