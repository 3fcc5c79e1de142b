import type { Arrangement, ArrangementKind, Carrier, PhaseOrder } from "~/domain/plan-document/arrangement";
import { arrangementFaults } from "~/domain/plan-document/arrangement-fits";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { Supply } from "~/domain/plan-document/supply";

/** Arrangements that the sheet offers, commonest first. */
export const arrangementTitles: Record<ArrangementKind, string> = {
  single: "single conductor",
  pair: "pair, go and return",
  "twisted-pair": "twisted pair",
  flat: "flat, three in a row",
  trefoil: "trefoil",
  quad: "square, three and neutral",
  "flat-n": "flat, three and neutral",
  custom: "conductors of its own",
};

export const arrangementKinds = Object.keys(arrangementTitles) as ArrangementKind[];

/** Axis-to-axis distance to begin with: small single-core cables side by side. */
const usualSpacingM = 0.03;
/** A lay is commonly a few tens of times the spacing. */
const usualLays = 20;

type Conductor = Extract<Arrangement, { kind: "custom" }>["conductors"][number];

const conductor = (of: Carrier, pM: number, qM: number): Conductor => ({
  offsetM: [pM, qM],
  of,
  fraction: 1,
});

const onePhaseKinds: readonly ArrangementKind[] = ["single", "pair", "twisted-pair"];

function startingConductors(present: Arrangement | null, spacingM: number): Conductor[] {
  const half = spacingM / 2;
  return present === null || onePhaseKinds.includes(present.kind)
    ? [conductor("go", -half, 0), conductor("return", half, 0)]
    : [
        conductor("a", -half, half),
        conductor("b", half, half),
        conductor("c", half, -half),
        conductor("n", -half, -half),
      ];
}

const phased: readonly ArrangementKind[] = ["flat", "trefoil", "quad", "flat-n"];

export const hasPhases = (
  arrangement: Arrangement,
): arrangement is Extract<Arrangement, { kind: "flat" | "trefoil" | "quad" | "flat-n" }> =>
  phased.includes(arrangement.kind);

/** The arrangement of another kind with the spacing, the turn and the parallel sets of the present one, as far as it has them. */
export function arrangementOf(
  kind: ArrangementKind,
  present: Arrangement | null,
  leastSpacingM = 0,
): Arrangement {
  const rollDeg = present?.rollDeg ?? 0;
  const spacingM =
    present !== null && "spacingM" in present ? present.spacingM : Math.max(usualSpacingM, leastSpacingM);
  const sets = present !== null && "parallel" in present ? present.parallel : null;
  const plain = sets && { sets: sets.sets, pitchM: sets.pitchM };
  switch (kind) {
    case "single":
      return { kind, rollDeg, parallel: plain };
    case "pair":
      return { kind, spacingM, rollDeg, parallel: plain };
    case "twisted-pair":
      return { kind, spacingM, layM: usualLays * spacingM, rollDeg, parallel: plain };
    case "custom":
      return { kind, conductors: startingConductors(present, spacingM), rollDeg };
    default: {
      const phaseOrders =
        present !== null && hasPhases(present) ? (present.parallel?.phaseOrders ?? null) : null;
      return { kind, spacingM, rollDeg, parallel: plain && { ...plain, phaseOrders } };
    }
  }
}

/** Why a circuit's parts do not go together, in words; null where they do. */
export const circuitProblem = (circuit: Circuit): string | null =>
  arrangementFaults(circuit)[0]?.message ?? null;

/** The circuit in another arrangement; conductors that would overlap stand apart. */
export const rearranged = (circuit: Circuit, kind: ArrangementKind): Circuit => ({
  ...circuit,
  arrangement: arrangementOf(kind, circuit.arrangement, 2 * circuit.conductorRadiusM),
});

/** The kinds that this circuit may change to as it stands. */
export const fittingKinds = (circuit: Circuit): ArrangementKind[] =>
  arrangementKinds.filter(
    (kind) => kind === circuit.arrangement.kind || circuitProblem(rearranged(circuit, kind)) === null,
  );

export const fitsSupply = (circuit: Circuit, supply: Supply): boolean =>
  circuitProblem({ ...circuit, supply }) === null;

/** How far apart parallel sets stand to begin with, axis to axis. */
const usualPitch = 4;

/** So many sets side by side; one is none beside. Orders that are there stay. */
export function withSets(arrangement: Arrangement, sets: number): Arrangement {
  if (arrangement.kind === "custom") return arrangement;
  if (sets <= 1) return { ...arrangement, parallel: null };
  const spacingM = "spacingM" in arrangement ? arrangement.spacingM : usualSpacingM;
  const pitchM = arrangement.parallel?.pitchM ?? usualPitch * spacingM;
  if (!hasPhases(arrangement)) return { ...arrangement, parallel: { sets, pitchM } };
  const orders = arrangement.parallel?.phaseOrders ?? null;
  const phaseOrders =
    orders && Array.from({ length: sets }, (_, index): PhaseOrder => orders[index] ?? "abc");
  return { ...arrangement, parallel: { sets, pitchM, phaseOrders } };
}

/** The phase order of one of the parallel sets; all "abc" is the same as none stated. */
export function withPhaseOrder(arrangement: Arrangement, set: number, order: PhaseOrder): Arrangement {
  if (!hasPhases(arrangement) || arrangement.parallel === null) return arrangement;
  const { sets, phaseOrders: present } = arrangement.parallel;
  const orders = Array.from({ length: sets }, (_, index): PhaseOrder =>
    index === set ? order : (present?.[index] ?? "abc"),
  );
  const phaseOrders = orders.every((each) => each === "abc") ? null : orders;
  return { ...arrangement, parallel: { ...arrangement.parallel, phaseOrders } };
}
