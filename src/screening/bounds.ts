import type { ResolvedEquipment } from "~/domain/plan-document/resolved";
import { distance, subtract, type Vector } from "~/field/vector";
import type { FrequencyTable } from "./frequency-classes";
import { classOf } from "./frequency-classes";

/** A dipole of unknown direction: known by the largest field at a distance, so that only a bound is known elsewhere. */
export interface BoundItem {
  id: string;
  name: string;
  centre: Vector;
  frequencyHz: number;
  /** Largest field at `distanceM`, shielding included, T (rms). */
  fieldT: number;
  distanceM: number;
  tolerancePercent: number;
}

/** Bounds at one point at load factor 1, one number per bound item. */
export interface BoundField {
  fieldT: Float64Array;
  gradientTPerM: Float64Array;
  /** Unit vector from each centre to the point: bounds fall along it. */
  outward: Vector[];
  distanceM: Float64Array;
}

/** Frobenius norm of a dipole's gradient on its axis, where it is greatest: √54/2 · B d³/r⁴ with B(d) = μ₀m/2πd³. */
const GRADIENT_SHARE = Math.sqrt(54) / 2;

export function boundItems(equipment: readonly ResolvedEquipment[]): BoundItem[] {
  return equipment.flatMap((item) =>
    item.kind === "dipole" && !item.direction
      ? [
          {
            id: item.id,
            name: item.name,
            centre: item.centre,
            frequencyHz: item.frequencyHz,
            fieldT: item.reading.fieldT * item.shieldingFactor,
            distanceM: item.reading.distanceM,
            tolerancePercent: item.tolerancePercent,
          },
        ]
      : [],
  );
}

export function boundsAt(bounds: readonly BoundItem[], at: Vector): BoundField {
  // At the centre itself nothing bounds the field; a finite stand-in keeps the sums finite, and the verdict is capped.
  const distances = bounds.map((bound) => Math.max(distance(bound.centre, at), 1e-6));
  const fieldOf = (bound: BoundItem, r: number) => bound.fieldT * (bound.distanceM / r) ** 3;
  return {
    fieldT: Float64Array.from(bounds, (bound, i) => fieldOf(bound, distances[i] as number)),
    gradientTPerM: Float64Array.from(bounds, (bound, i) => {
      const r = distances[i] as number;
      return (GRADIENT_SHARE * fieldOf(bound, r)) / r;
    }),
    outward: bounds.map((bound, i) => {
      const [x, y, z] = subtract(at, bound.centre);
      const r = distances[i] as number;
      return [x / r, y / r, z / r];
    }),
    distanceM: Float64Array.from(distances),
  };
}

export const boundClass = (bound: BoundItem, frequencies: FrequencyTable): number =>
  classOf(frequencies.classesHz, bound.frequencyHz);
