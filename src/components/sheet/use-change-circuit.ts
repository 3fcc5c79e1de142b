import type { Circuit } from "~/domain/plan-document/circuit";
import { circuitProblem } from "~/sheet/edits/arrangements";
import { updateCircuit } from "~/sheet/edits/circuits";
import type { ChangeCircuit } from "./panels/changes";
import { useSheetStore } from "./store";

/** Edits of one circuit; what would not go together is refused unless it was so before. */
export function useChangeCircuit(circuit: Circuit): ChangeCircuit {
  const store = useSheetStore();
  return (label, how) => {
    const changed = how(circuit);
    const problem = circuitProblem(changed);
    if (problem !== null && circuitProblem(circuit) === null) return problem;
    store.edit(`${label} of ${circuit.name}`, (whole) => updateCircuit(whole, circuit.id, how));
    return null;
  };
}
