import type { Arrangement } from "~/domain/plan-document/arrangement";
import type { Circuit, CurrentBasis } from "~/domain/plan-document/circuit";
import type { Equipment } from "~/domain/plan-document/equipment";
import { largestCurrentA } from "~/domain/plan-document/phasors";
import { millimetres } from "~/domain/units";
import { formatCurrent, formatField, formatLength, formatNumber } from "~/domain/format";

const arrangementNames: Record<Arrangement["kind"], string> = {
  single: "single conductor",
  pair: "pair",
  "twisted-pair": "twisted pair",
  flat: "flat",
  trefoil: "trefoil",
  quad: "quad",
  "flat-n": "flat with neutral",
  custom: "custom",
};

export const basisNames: Record<CurrentBasis, string> = {
  measured: "measured",
  "load-list": "load list",
  "rating-plate": "rating plate",
  breaker: "breaker rating, an upper bound",
  assumed: "assumed",
};

/** "trefoil, 30 mm apart, 2 sets". */
export function arrangementWords(arrangement: Arrangement): string {
  const parts = [arrangementNames[arrangement.kind]];
  if ("spacingM" in arrangement)
    parts.push(`${formatNumber(millimetres(arrangement.spacingM), 0)}\u00a0mm apart`);
  if ("layM" in arrangement) parts.push(`lay ${formatNumber(millimetres(arrangement.layM), 0)}\u00a0mm`);
  if ("parallel" in arrangement && arrangement.parallel !== null)
    parts.push(`${String(arrangement.parallel.sets)} sets`);
  return parts.join(", ");
}

/** "DC 120 A", "AC 400 A, 50 Hz, three-phase". */
export function supplyWords(supply: Circuit["supply"]): string {
  if (supply === null) return "current not known";
  const current = formatCurrent(largestCurrentA(supply));
  if (supply.kind === "dc") return `DC ${formatCurrent(supply.currentA)}`;
  const harmonics = supply.harmonics.map(
    ({ order, percent }) => `${String(percent)}\u00a0% of order ${String(order)}`,
  );
  const phases = supply.kind === "ac3" ? "three-phase" : "single-phase";
  return [`AC ${current}`, `${String(supply.frequencyHz)}\u00a0Hz`, phases, ...harmonics].join(", ");
}

export function equipmentWords(equipment: Equipment): string {
  switch (equipment.kind) {
    case "coil":
      return `coil of ${String(equipment.turns)} turns, radius ${formatLength(equipment.radiusM)}`;
    case "toroid":
      return `toroid of ${String(equipment.turns)} turns, mean radius ${formatLength(equipment.meanRadiusM)}`;
    case "dipole":
      return `known by a reading: ${formatField(equipment.reading.fieldT)} at ${formatLength(equipment.reading.distanceM)}`;
  }
}
