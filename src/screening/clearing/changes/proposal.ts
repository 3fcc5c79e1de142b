import type { ChangeKind, PlanPatch } from "~/domain/clearing";
import { circuit as circuitSchema, type Circuit } from "~/domain/plan-document/circuit";

/** One change that might give some budget back, not judged yet. */
export interface Proposal {
  kind: ChangeKind;
  words: string;
  /** Circuits and routes that it touches. */
  ids: string[];
  patch: PlanPatch;
  /** Whether ends of single conductors may come apart by it, so that the current balance has to be looked at. */
  movesSingles: boolean;
}

export const called = ({ id, name }: { id: string; name: string }): string => `“${name === "" ? id : name}”`;

/** A change of one circuit by itself; none where the plan document refuses what comes of it. */
export function circuitProposal(
  kind: ChangeKind,
  words: string,
  circuit: Circuit,
  changed: Partial<Circuit>,
): Proposal[] {
  const parsed = circuitSchema.safeParse({ ...circuit, ...changed });
  if (!parsed.success) return [];
  const patch = { circuits: [parsed.data], routes: [] };
  return [{ kind, words, ids: [circuit.id], patch, movesSingles: false }];
}
