import { MAX_SEGMENTS } from "~/domain/plan-document/load";
import type { DocumentFault } from "~/domain/plan-document/faults";
import type { ResolvedCircuit, ResolvedPlanDocument } from "~/domain/plan-document/resolved";
import { boundItems, type BoundItem } from "./bounds";
import { compileCircuit } from "./compile-circuit";
import { compileEquipment } from "./compile-equipment";
import { frequencyClasses, GroupTable, type FrequencyTable } from "./frequency-classes";
import { RefusedDocumentError } from "./refusal";
import { routeLines, type RouteLines } from "./route-lines";
import type { Drive, SourceItem } from "./source-item";
import { sectionFrames } from "~/field/section-frames";

/** Most contributions that one result lists: beyond it neither JSON nor memory holds it. */
export const MAX_RESULT_ENTRIES = 2_000_000;

/** One drive of one item with its place in the flat tables. */
export interface Component {
  item: number;
  /** Index of the item's first set in the influence matrix. */
  firstSet: number;
  drive: Drive;
  group: number;
}

/** Something drawn that cannot be computed yet, so that no verdict is better than undecided. */
export interface WaitingCircuit {
  id: string;
  name: string;
  missing: ("path" | "supply")[];
}

/** A document made ready for the field: geometry apart from currents (physics: the influence matrix g[k]). */
export interface CompiledPlan {
  document: ResolvedPlanDocument;
  items: SourceItem[];
  /** Index of each item's first set. */
  firstSets: number[];
  setCount: number;
  components: Component[];
  frequencies: FrequencyTable;
  /** Dipoles of unknown direction, which are no items: only the magnitude of their field is bounded. */
  bounds: BoundItem[];
  waiting: WaitingCircuit[];
  warnings: string[];
  routes: RouteLines;
}

/** Throws RefusedDocumentError with every fault of geometry found. */
export function compilePlan(document: ResolvedPlanDocument): CompiledPlan {
  const faults: DocumentFault[] = [];
  const warnings: string[] = [];
  const items: SourceItem[] = [];
  const waiting: WaitingCircuit[] = [];
  const routes = routeLines(document.routes, faults);
  let segments = 0;

  document.circuits.forEach((circuit, index) => {
    const missing = missingOf(circuit);
    if (missing.length > 0) waiting.push({ id: circuit.id, name: circuit.name, missing });
    const line = circuit.path ? { ok: true as const, points: circuit.path } : routes.lineOf(circuit);
    if (!line) return;
    const at = circuit.path ? `circuits[${index}].path` : `circuits[${index}].route`;
    const framed = line.ok ? sectionFrames(line.points) : line;
    if (!framed.ok) {
      faults.push({ path: at, message: framed.message });
      return;
    }
    warnings.push(...pathWarnings(circuit, framed.frames.zeroSegments, framed.frames.bevelled));
    if (!circuit.supply) return;
    const compiled = compileCircuit(circuit, circuit.supply, framed.frames, at);
    if (!compiled.ok) {
      faults.push(compiled.fault);
      return;
    }
    segments += compiled.segments;
    items.push(compiled.item);
  });
  document.equipment.forEach((equipment, index) => {
    const item = compileEquipment(equipment, `equipment[${index}]`);
    if (item) items.push(item);
    // A turn costs about as much as a segment.
    if (equipment.kind === "coil") segments += equipment.turns;
  });
  if (segments > MAX_SEGMENTS) {
    const message = `${segments} conductor segments and turns; at most ${MAX_SEGMENTS} are screened at once. Split the plan by area`;
    faults.push({ path: "circuits", message });
  }
  const entries = items.length * document.sensors.reduce((sum, { limits }) => sum + limits.length, 0);
  if (entries > MAX_RESULT_ENTRIES) {
    const message = `${items.length} sources on ${document.sensors.length} sensors would make a result of ${entries} contributions; at most ${MAX_RESULT_ENTRIES} are listed. Split the plan by area`;
    faults.push({ path: "sensors", message });
  }
  if (faults.length > 0) throw new RefusedDocumentError(faults);
  const bounds = boundItems(document.equipment);
  return { document, items, bounds, waiting, warnings, routes, ...tablesOf(document, items) };
}

function missingOf(circuit: ResolvedCircuit): ("path" | "supply")[] {
  const traced = circuit.path !== null || circuit.route !== null;
  return [...(traced ? [] : ["path" as const]), ...(circuit.supply ? [] : ["supply" as const])];
}

function pathWarnings(circuit: ResolvedCircuit, zeroSegments: number, bevelled: boolean[]): string[] {
  const called = `Circuit "${circuit.name}" (${circuit.id})`;
  const warnings: string[] = [];
  if (zeroSegments > 0)
    warnings.push(`${called}: ${zeroSegments} segment(s) of zero length in its path were left out.`);
  const bevels = bevelled.filter(Boolean).length;
  if (bevels > 0) {
    warnings.push(
      `${called}: ${bevels} bend(s) above 120° were bevelled instead of mitred; no accuracy is claimed close to them.`,
    );
  }
  return warnings;
}

function tablesOf(document: ResolvedPlanDocument, items: SourceItem[]) {
  const frequenciesHz = [
    ...items.flatMap((item) => item.drives.map((drive) => drive.frequencyHz)),
    ...document.equipment.map((item) => (item.kind === "dipole" ? item.frequencyHz : 0)),
    ...document.sensors.flatMap((sensor) =>
      (sensor.background?.alternating ?? []).map((line) => line.frequencyHz),
    ),
  ];
  const classesHz = frequencyClasses(frequenciesHz);
  const table = new GroupTable(classesHz);
  const firstSets: number[] = [];
  const components: Component[] = [];
  let setCount = 0;
  items.forEach((item, index) => {
    firstSets.push(setCount);
    for (const drive of item.drives) {
      const group = table.indexOf(item.source, drive.frequencyHz);
      components.push({ item: index, firstSet: setCount, drive, group });
    }
    setCount += item.sets.length;
  });
  return { firstSets, setCount, components, frequencies: { classesHz, groups: table.groups } };
}
