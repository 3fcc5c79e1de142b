import type { DocumentFault } from "~/domain/plan-document/faults";
import type { ResolvedEquipment } from "~/domain/plan-document/resolved";
import { add, along, distance, dot, scale, subtract, unit, type Vector } from "~/field/vector";
import type { CompiledPlan } from "../compile";
import { turnCentres } from "../compile-equipment";
import type { CircuitItem } from "../source-item";
import { reachOf } from "./near-conductors";

/** A loop may not come nearer to the wire of a coil than this, metres: the wire has no thickness in the document. */
const WIRE_CLEARANCE_M = 1e-3;
/** Points at which a side is held against a ring; between them the ring is no nearer than a side's share allows. */
const RING_CHORDS = 256;

/**
 * Why no clamp could lie where a loop lies: sides that pass through conductors, or through the winding of a coil or toroid, each
 * with its place. `loop` is closed; its corners are in metres.
 */
export function loopFaults(plan: CompiledPlan, loop: readonly Vector[]): DocumentFault[] {
  const faults: DocumentFault[] = [];
  loop.forEach((from, index) => {
    const to = loop[(index + 1) % loop.length] ?? from;
    for (const { what, at } of touched(plan, from, to)) {
      const place = at.map((coordinate) => Number(coordinate.toFixed(3))).join(", ");
      const message = `this side passes through ${what} at (${place}); lead it around`;
      faults.push({ path: `loop[${index}]`, message });
    }
  });
  return faults;
}

interface Touch {
  what: string;
  at: Vector;
}

function touched(plan: CompiledPlan, from: Vector, to: Vector): Touch[] {
  const byCircuits = plan.items.flatMap((item): Touch[] => {
    const at = item.kind === "circuit" ? throughCircuit(item, from, to) : null;
    return at && item.kind === "circuit"
      ? [{ what: `a conductor of "${item.circuit.name}" (${item.id})`, at }]
      : [];
  });
  const byEquipment = plan.document.equipment.flatMap((equipment): Touch[] => {
    const at = throughWinding(equipment, from, to);
    return at ? [{ what: `the winding of "${equipment.name}" (${equipment.id})`, at }] : [];
  });
  return [...byCircuits, ...byEquipment];
}

/** A twisted pair fills all that it sweeps. */
function throughCircuit(item: CircuitItem, from: Vector, to: Vector): Vector | null {
  const clearanceM = item.twisted ? reachOf(item) + item.conductorRadiusM : item.conductorRadiusM;
  const lines = item.twisted
    ? item.legs.map(({ start, end }) => [start, end] as const)
    : item.conductors.flatMap(({ points }) =>
        points.slice(1).map((end, index) => [points[index] ?? end, end] as const),
      );
  for (const [start, end] of lines) {
    const near = nearestPoints(from, to, start, end);
    if (near.distanceM < clearanceM) return near.at;
  }
  return null;
}

function throughWinding(equipment: ResolvedEquipment, from: Vector, to: Vector): Vector | null {
  if (equipment.kind === "dipole") return null;
  const isCoil = equipment.kind === "coil";
  const clearanceM = isCoil ? WIRE_CLEARANCE_M : equipment.minorRadiusM;
  const radiusM = isCoil ? equipment.radiusM : equipment.meanRadiusM;
  const { centre, axis } = equipment;
  const centres = isCoil ? turnCentres(centre, axis, equipment.lengthM, equipment.turns) : [centre];
  // Whole windings that a side does not come near need no look at each turn.
  const reachM = radiusM + clearanceM + (isCoil ? equipment.lengthM / 2 : 0);
  if (nearestPoints(from, to, centre, centre).distanceM > reachM) return null;
  for (const turn of centres) {
    const ring = ringOf(turn, axis, radiusM);
    for (const [index, start] of ring.entries()) {
      const near = nearestPoints(from, to, start, ring[(index + 1) % ring.length] ?? start);
      if (near.distanceM < clearanceM) return near.at;
    }
  }
  return null;
}

function ringOf(centre: Vector, axis: Vector, radiusM: number): Vector[] {
  const n = unit(axis);
  const aside: Vector = Math.abs(n[0]) < 0.9 ? [1, 0, 0] : [0, 1, 0];
  const u = unit(along(aside, n, -dot(aside, n)));
  const v: Vector = [n[1] * u[2] - n[2] * u[1], n[2] * u[0] - n[0] * u[2], n[0] * u[1] - n[1] * u[0]];
  return Array.from({ length: RING_CHORDS }, (_, index) => {
    const angle = (2 * Math.PI * index) / RING_CHORDS;
    return add(centre, add(scale(u, radiusM * Math.cos(angle)), scale(v, radiusM * Math.sin(angle))));
  });
}

/** Least distance of two straight stretches, and the point of the first where it is (Ericson, Real-Time Collision Detection 5.1.9). */
function nearestPoints(a: Vector, b: Vector, c: Vector, d: Vector): { distanceM: number; at: Vector } {
  const [d1, d2, r] = [subtract(b, a), subtract(d, c), subtract(a, c)];
  const [aa, ee, f] = [dot(d1, d1), dot(d2, d2), dot(d2, r)];
  const clamp = (share: number) => Math.min(1, Math.max(0, share));
  let s = 0;
  let t = 0;
  if (aa > 0 && ee > 0) {
    const [bb, cc] = [dot(d1, d2), dot(d1, r)];
    const divisor = aa * ee - bb * bb;
    s = divisor > 1e-14 * aa * ee ? clamp((bb * f - cc * ee) / divisor) : 0;
    t = (bb * s + f) / ee;
    if (t < 0 || t > 1) {
      t = clamp(t);
      s = clamp((bb * t - cc) / aa);
    }
  } else if (aa > 0) s = clamp(-dot(d1, r) / aa);
  else if (ee > 0) t = clamp(f / ee);
  const at = along(a, d1, s);
  return { distanceM: distance(at, along(c, d2, t)), at };
}
