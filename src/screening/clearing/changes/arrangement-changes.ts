import { touchingSpacingM } from "~/domain/catalogue";
import type { Circuit } from "~/domain/plan-document/circuit";
import { millimetres } from "~/domain/units";
import { called, circuitProposal, type Proposal } from "./proposal";

/** Copper per area of the circle around a stranded conductor, as the catalogue takes it. */
const FILLING = 0.93;
/** Length of one turn of a twisted pair by its spacing. */
const LAY_PER_SPACING = 10;
/** A spacing nearer than this share to the touching one is touching already. */
const NO_CLOSER = 0.98;

/** Conductors closer together, in trefoil, or twisted. */
export function arrangementChanges(circuit: Circuit): Proposal[] {
  return [...closer(circuit), ...bundled(circuit), ...twisted(circuit)];
}

/**
 * The plan knows the conductor's radius and not its insulation, so that "touching" is taken from usual 0.6/1 kV single-core cables
 * of that conductor, never bare metal.
 */
function closer(circuit: Circuit): Proposal[] {
  const { arrangement, conductorRadiusM } = circuit;
  if (!("spacingM" in arrangement)) return [];
  const areaMm2 = FILLING * Math.PI * millimetres(conductorRadiusM) ** 2;
  const usualM = touchingSpacingM(areaMm2);
  if (usualM === null) return [];
  const spacingM = Number(Math.max(usualM, 2 * conductorRadiusM).toFixed(4));
  if (spacingM > NO_CLOSER * arrangement.spacingM) return [];
  const words =
    `Bring the conductors of ${called(circuit)} together until the cables touch: ${mm(spacingM)} axis to axis in place of ` +
    `${mm(arrangement.spacingM)}, for usual single-core cable of that conductor (its insulation is not stated)`;
  return circuitProposal("spacing", words, circuit, { arrangement: { ...arrangement, spacingM } });
}

function bundled(circuit: Circuit): Proposal[] {
  const { arrangement } = circuit;
  if (arrangement.kind === "flat") {
    const words = `Lay ${called(circuit)} in trefoil in place of flat, ${mm(arrangement.spacingM)} axis to axis as now`;
    return circuitProposal("trefoil", words, circuit, { arrangement: { ...arrangement, kind: "trefoil" } });
  }
  if (arrangement.kind !== "flat-n") return [];
  const words = `Lay ${called(circuit)} and its neutral in a square in place of flat, ${mm(arrangement.spacingM)} axis to axis as now`;
  return circuitProposal("trefoil", words, circuit, { arrangement: { ...arrangement, kind: "quad" } });
}

function twisted(circuit: Circuit): Proposal[] {
  const { arrangement } = circuit;
  if (arrangement.kind !== "pair") return [];
  const layM = Number((LAY_PER_SPACING * arrangement.spacingM).toFixed(4));
  const words = `Twist ${called(circuit)}, one turn every ${mm(layM)}`;
  return circuitProposal("twisting", words, circuit, {
    arrangement: { ...arrangement, kind: "twisted-pair", layM },
  });
}

const mm = (lengthM: number): string => `${Number(millimetres(lengthM).toPrecision(3))}\u00a0mm`;
