import type { Arrangement, Carrier } from "~/domain/plan-document/arrangement";
import { isSingle } from "~/domain/plan-document/arrangement-fits";
import type { DocumentFault } from "~/domain/plan-document/faults";
import type { ResolvedCircuit } from "~/domain/plan-document/resolved";
import type { Supply } from "~/domain/plan-document/supply";
import { segmentSet, type ConductorSet } from "~/field/conductor-set";
import { offsetPath, type SectionFrames } from "~/field/section-frames";
import { distance, type Vector } from "~/field/vector";
import { conductorCurrents, type ConductorCurrents } from "./conductor-currents";
import { slotsOf, spaced } from "./slots";
import { twistedSets } from "./twisted-sets";
import { SPACING_STEP, type CircuitItem, type DrawnConductor, type Drive } from "./source-item";

export type CompiledCircuit =
  { ok: true; item: CircuitItem; segments: number } | { ok: false; fault: DocumentFault };

/** `path` is where a fault of the geometry is reported, e.g. `circuits[3].path`. Lays a circuit's conductors along its framed centre line and gives them their currents. */
export function compileCircuit(
  circuit: ResolvedCircuit,
  supply: Supply,
  frames: SectionFrames,
  path: string,
): CompiledCircuit {
  const { arrangement } = circuit;
  const carriers = [...new Set(slotsOf(arrangement).map(({ carrier }) => carrier))];
  const laid = layConductors(arrangement, carriers, frames);
  if (!laid.ok) return { ok: false, fault: { path, message: laid.message } };
  const respaced = circuit.spacingTolerancePercent > 0 ? respacedSets(circuit, carriers, frames) : null;
  const sets = setsFor(circuit, arrangement, carriers, frames);
  if (!sets)
    return { ok: false, fault: { path, message: "the parallel sets do not fit the bends of the path" } };
  const centreLine = isSingle(circuit.arrangement) ? null : centreLineSet(frames, circuit.conductorRadiusM);
  const item: CircuitItem = {
    kind: "circuit",
    id: circuit.id,
    circuit,
    path,
    source: circuit.source,
    shieldingFactor: circuit.shieldingFactor,
    sets,
    drives: conductorCurrents(circuit, supply).map((currents) => driveOf(currents, carriers)),
    centreLine,
    respaced,
    legs: frames.legs,
    // A twisted pair's conductors depend on where they are seen from; for the checks they run as drawn, untwisted.
    conductors: laid.conductors,
    twisted: arrangement.kind === "twisted-pair",
    conductorRadiusM: circuit.conductorRadiusM,
    bends: frames.legs.slice(1).map(({ start }) => start),
  };
  const segments = laid.conductors.reduce((sum, { points }) => sum + points.length - 1, 0);
  return { ok: true, item, segments };
}

type LaidConductors = { ok: true; conductors: DrawnConductor[] } | { ok: false; message: string };

function layConductors(arrangement: Arrangement, carriers: Carrier[], frames: SectionFrames): LaidConductors {
  const conductors: DrawnConductor[] = [];
  for (const { p, q, carrier, share } of slotsOf(arrangement)) {
    const line = offsetPath(frames, p, q);
    if (!line.ok) return line;
    conductors.push({ set: carriers.indexOf(carrier), share, points: joinedToEnds(line.points, frames) });
  }
  return { ok: true, conductors };
}

function setsOf(conductors: DrawnConductor[], carriers: Carrier[], radiusM: number): ConductorSet[] {
  return carriers.map((_, set) => segmentSet(rowsOf(conductors, set, radiusM)));
}

function setsFor(
  { conductorRadiusM }: ResolvedCircuit,
  arrangement: Arrangement,
  carriers: Carrier[],
  frames: SectionFrames,
): ConductorSet[] | null {
  if (arrangement.kind === "twisted-pair")
    return twistedSets(arrangement, carriers, frames, conductorRadiusM);
  const laid = layConductors(arrangement, carriers, frames);
  return laid.ok ? setsOf(laid.conductors, carriers, conductorRadiusM) : null;
}

function respacedSets(
  circuit: ResolvedCircuit,
  carriers: Carrier[],
  frames: SectionFrames,
): CircuitItem["respaced"] {
  const setsAt = (factor: number) => setsFor(circuit, spaced(circuit.arrangement, factor), carriers, frames);
  const wider = setsAt(1 + SPACING_STEP);
  const narrower = setsAt(1 - SPACING_STEP);
  return wider && narrower && { wider, narrower };
}

/** The path's own ends before and after the conductor's line, so that only net current leaves there. */
function joinedToEnds(points: Vector[], frames: SectionFrames): Vector[] {
  const start = frames.legs[0]?.start;
  const end = frames.legs[frames.legs.length - 1]?.end;
  return [...(start ? [start] : []), ...points, ...(end ? [end] : [])];
}

function rowsOf(conductors: DrawnConductor[], set: number, radiusM: number): Float64Array {
  const rows: number[] = [];
  for (const conductor of conductors) {
    if (conductor.set !== set || conductor.share === 0) continue;
    conductor.points.forEach((to, index) => {
      const from = conductor.points[index - 1];
      if (from && distance(from, to) > 0) rows.push(...from, ...to, radiusM, conductor.share);
    });
  }
  return Float64Array.from(rows);
}

function centreLineSet(frames: SectionFrames, radiusM: number): ConductorSet {
  const rows = frames.legs.flatMap(({ start, end }) => [...start, ...end, radiusM, 1]);
  return segmentSet(Float64Array.from(rows));
}

function driveOf({ frequencyHz, order, supply, stray }: ConductorCurrents, carriers: Carrier[]): Drive {
  const currents = new Float64Array(2 * carriers.length);
  const scaling = new Float64Array(2 * carriers.length);
  carriers.forEach((carrier, set) => {
    const flowing = supply[carrier] ?? { re: 0, im: 0 };
    const taken = stray[carrier] ?? { re: 0, im: 0 };
    scaling[2 * set] = flowing.re;
    scaling[2 * set + 1] = flowing.im;
    currents[2 * set] = flowing.re + taken.re;
    currents[2 * set + 1] = flowing.im + taken.im;
  });
  return { frequencyHz, order, currents, scaling };
}
