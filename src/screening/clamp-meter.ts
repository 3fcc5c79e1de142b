import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { resolveDefaults } from "~/domain/plan-document/resolved";
import { MU_0 } from "~/domain/units";
import { linkedCirculation } from "~/field/circulation";
import { along, distance, dot, subtract, type Vector } from "~/field/vector";
import { loopFaults } from "./checks/loop-clearance";
import { turnCentres } from "./compile-equipment";
import { compilePlan, type CompiledPlan } from "./compile";
import { caseFactors } from "./load-cases";
import { RefusedDocumentError } from "./refusal";
import type { SourceItem } from "./source-item";

/** What a clamp meter around a loop should read: net DC, and net rms current per source and frequency, amperes. */
export interface ClampReading {
  /** Positive along the right-hand normal of the loop. */
  dcA: number;
  alternating: { source: string; frequencyHz: number; rmsA: number }[];
}

/**
 * ∮B·dl/μ₀ around a closed polygon in space (m) in one load case (null: the first, or as entered). Conductors count by what of
 * them passes through the loop; open ends, whose field closes by radial currents, by the solid angle under which they see it.
 * Throws RefusedDocumentError for an unknown load case, a loop without extent, and sides that pass through a conductor or a winding.
 */
export function clampMeterReading(
  document: PlanDocument,
  loop: readonly Vector[],
  loadCaseId: string | null = null,
): ClampReading {
  if (loop.length < 3 || loop.every((corner) => distance(corner, loop[0] ?? corner) < LEAST_EXTENT_M)) {
    throw new RefusedDocumentError([
      { path: "loop", message: "a loop has at least three corners that lie apart" },
    ]);
  }
  const plan = compilePlan(resolveDefaults(document));
  const cases = caseFactors(plan);
  const factors = loadCaseId === null ? cases[0] : cases.find(({ id }) => id === loadCaseId);
  if (!factors)
    throw new RefusedDocumentError([
      { path: "loadCases", message: `there is no load case "${loadCaseId ?? ""}"` },
    ]);

  const faults = loopFaults(plan, loop);
  if (faults.length > 0) throw new RefusedDocumentError(faults);
  const linked = linkedCurrents(plan, loop);
  const sums = new Float64Array(2 * plan.frequencies.groups.length);
  for (const { item, firstSet, group, drive } of plan.components) {
    for (let k = 0; 2 * k < drive.currents.length; k++) {
      const share = (linked[firstSet + k] as number) * (factors.items[item] as number);
      sums[2 * group] = (sums[2 * group] as number) + share * (drive.currents[2 * k] as number);
      sums[2 * group + 1] = (sums[2 * group + 1] as number) + share * (drive.currents[2 * k + 1] as number);
    }
  }
  return {
    dcA: sums[0] as number,
    alternating: plan.frequencies.groups.flatMap(({ source, frequencyHz, classIndex }, group) =>
      classIndex === 0
        ? []
        : [
            {
              source,
              frequencyHz,
              rmsA: Math.hypot(sums[2 * group] as number, sums[2 * group + 1] as number),
            },
          ],
    ),
  };
}

/** Per set, the current through the loop for 1 A in the set. Shielding does not change what a clamp meter reads. */
function linkedCurrents(plan: CompiledPlan, loop: readonly Vector[]): Float64Array {
  const linked = new Float64Array(plan.setCount);
  plan.items.forEach((item, index) => {
    const firstSet = plan.firstSets[index] as number;
    if (item.kind === "circuit") {
      for (const { set, share, points } of item.conductors) {
        linked[firstSet + set] =
          (linked[firstSet + set] as number) + (share * linkedCirculation(loop, points)) / MU_0;
      }
    } else linked[firstSet] = equipmentLink(item, loop);
  });
  return linked;
}

/** No clamp is smaller, metres. */
const LEAST_EXTENT_M = 1e-3;

/** How often a loop passes through the turns of a coil or toroid, along their axis; a dipole's field has no circulation. */
function equipmentLink(
  { equipment }: Extract<SourceItem, { kind: "equipment" }>,
  loop: readonly Vector[],
): number {
  if (equipment.kind === "dipole") return 0;
  const { centre, axis } = equipment;
  if (equipment.kind === "toroid") return passagesThrough(loop, centre, axis, equipment.meanRadiusM);
  const turns = turnCentres(centre, axis, equipment.lengthM, equipment.turns);
  return turns.reduce((sum, turn) => sum + passagesThrough(loop, turn, axis, equipment.radiusM), 0);
}

/** Signed passages of a loop's sides through the disc that a turn bounds. */
function passagesThrough(loop: readonly Vector[], centre: Vector, axis: Vector, radiusM: number): number {
  let passages = 0;
  loop.forEach((from, index) => {
    const to = loop[(index + 1) % loop.length] ?? from;
    const before = dot(axis, subtract(from, centre));
    const after = dot(axis, subtract(to, centre));
    if (before < 0 === after < 0) return;
    const at = along(from, subtract(to, from), before / (before - after));
    if (distance(at, centre) < radiusM) passages += after > before ? 1 : -1;
  });
  return passages;
}
