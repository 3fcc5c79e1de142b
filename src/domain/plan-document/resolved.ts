import { isSingle } from "./arrangement-fits";
import { CURRENT_TOLERANCE_PERCENT, type Circuit } from "./circuit";
import type { Equipment } from "./equipment";
import { largestCurrentA } from "./phasors";
import type { PlanDocument } from "./plan-document";

/** Stray current assumed where none is stated, as a share of the circuit's current. */
const UNKNOWN_STRAY_SHARE = 0.01;

export type ResolvedCircuit = Omit<Circuit, "source" | "currentTolerancePercent" | "strayToleranceA"> & {
  source: string;
  currentTolerancePercent: number;
  strayToleranceA: number;
};

export type ResolvedEquipment = Equipment & { source: string };

export type ResolvedPlanDocument = Omit<PlanDocument, "circuits" | "equipment"> & {
  circuits: ResolvedCircuit[];
  equipment: ResolvedEquipment[];
};

/** Replaces every "by rule" by what the rule gives: the circuit as its own source, tolerances by basis, the bound of unknown stray current. */
export function resolveDefaults(document: PlanDocument): ResolvedPlanDocument {
  return {
    ...document,
    circuits: document.circuits.map(resolveCircuit),
    equipment: document.equipment.map((item) => ({ ...item, source: item.source ?? item.id })),
  };
}

function resolveCircuit(circuit: Circuit): ResolvedCircuit {
  return {
    ...circuit,
    source: circuit.source ?? circuit.id,
    currentTolerancePercent:
      circuit.currentTolerancePercent ?? CURRENT_TOLERANCE_PERCENT[circuit.currentBasis],
    strayToleranceA: circuit.strayToleranceA ?? defaultStrayToleranceA(circuit),
  };
}

function defaultStrayToleranceA({ arrangement, supply, strayCurrentA }: Circuit): number {
  if (isSingle(arrangement) || strayCurrentA !== null || supply === null) return 0;
  return UNKNOWN_STRAY_SHARE * largestCurrentA(supply);
}
