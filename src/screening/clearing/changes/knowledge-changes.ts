import { CURRENT_TOLERANCE_PERCENT, type Circuit } from "~/domain/plan-document/circuit";
import { called, circuitProposal, type Proposal } from "./proposal";

/** The stray current mended, and the current known as well as a measured one. */
export function knowledgeChanges(circuit: Circuit): Proposal[] {
  return [...mended(circuit), ...measured(circuit)];
}

function mended(circuit: Circuit): Proposal[] {
  const { strayCurrentA, strayToleranceA } = circuit;
  const none = { strayCurrentA: 0, strayToleranceA: null };
  if (strayCurrentA !== null && strayCurrentA !== 0) {
    const strayA = `${Number(Math.abs(strayCurrentA).toPrecision(3))}\u00a0A`;
    const words = `Find and mend what lets ${strayA} of ${called(circuit)} come back some other way`;
    return circuitProposal("stray-current", words, circuit, none);
  }
  if (strayCurrentA === 0 && !strayToleranceA) return [];
  const words = `Clamp ${called(circuit)} as a whole and make sure that no stray current leaves it`;
  return circuitProposal("stray-current", words, circuit, none);
}

function measured(circuit: Circuit): Proposal[] {
  const { currentTolerancePercent, currentBasis } = circuit;
  const presentPercent = currentTolerancePercent ?? CURRENT_TOLERANCE_PERCENT[currentBasis];
  const measuredPercent = CURRENT_TOLERANCE_PERCENT.measured;
  if (presentPercent <= measuredPercent) return [];
  const words =
    `Measure the current of ${called(circuit)}: known to ±${measuredPercent}\u00a0% in place of ` +
    `±${presentPercent}\u00a0%, if it is what was taken`;
  return circuitProposal("current-known", words, circuit, {
    currentBasis: "measured",
    currentTolerancePercent: null,
  });
}
