import type { ResolvedCircuit, ResolvedEquipment } from "~/domain/plan-document/resolved";
import type { ConductorSet } from "~/field/conductor-set";
import type { Leg } from "~/field/section-frames";
import type { Vector } from "~/field/vector";

/** What an item drives through its conductor sets at one frequency: interleaved re, im per set, A (rms). */
export interface Drive {
  frequencyHz: number;
  /** 0 for DC, 1 for the fundamental, the order for a harmonic. */
  order: number;
  /** All of it. */
  currents: Float64Array;
  /** The part that follows the supply's current and its tolerance. */
  scaling: Float64Array;
}

/** The straight conductors of a circuit as drawn, for the checks: one polyline each, from the path's start to its end. */
export interface DrawnConductor {
  set: number;
  share: number;
  points: Vector[];
}

/** A circuit made ready for the field: what carries current where, and what is known about it. */
export interface CircuitItem {
  kind: "circuit";
  id: string;
  circuit: ResolvedCircuit;
  /** Place in the document, e.g. `circuits[3]`. */
  path: string;
  source: string;
  shieldingFactor: number;
  sets: ConductorSet[];
  drives: Drive[];
  /** A net current on the centre line; null where none can be unstated. */
  centreLine: ConductorSet | null;
  /** The same sets with the spacing a share `SPACING_STEP` wider and narrower; null where it is certain. */
  respaced: { wider: ConductorSet[]; narrower: ConductorSet[] } | null;
  legs: Leg[];
  conductors: DrawnConductor[];
  twisted: boolean;
  conductorRadiusM: number;
  /** Places where the path bends, metres. */
  bends: Vector[];
}

/** Share of the spacing over which its influence is differenced. */
export const SPACING_STEP = 1e-3;

/** Equipment whose field is linear in its current or reading. */
export interface EquipmentItem {
  kind: "equipment";
  id: string;
  equipment: ResolvedEquipment;
  path: string;
  source: string;
  shieldingFactor: number;
  sets: ConductorSet[];
  drives: Drive[];
}

export type SourceItem = CircuitItem | EquipmentItem;
