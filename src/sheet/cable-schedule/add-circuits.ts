import { conductorRadiusM, touchingSpacingM } from "~/domain/catalogue";
import type { ArrangementKind } from "~/domain/plan-document/arrangement";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Supply } from "~/domain/plan-document/supply";
import { arrangementOf } from "../edits/arrangements";
import { blankCircuit } from "../edits/circuits";
import { newId } from "../edits/ids";
import type { Cable, ScheduleRow } from "./read-schedule";

/** What a schedule does not say about the supply. */
export interface ScheduleChoices {
  /** Supply of cables with one or two cores whose load names neither DC nor AC. */
  twoCoreKind: "dc" | "ac1";
  frequencyHz: number;
}

const arrangementByLive = { 1: "single", 2: "pair", 3: "trefoil" } as const satisfies Record<
  1 | 2 | 3,
  ArrangementKind
>;

/** Without a count of cores the cable is taken for a pair. */
const liveCores = (cable: Cable): 1 | 2 | 3 => cable.cores?.live ?? 2;

function supplyOfCable(cable: Cable, choices: ScheduleChoices): Supply | null {
  if (cable.load === null) return null;
  const { currentA, kind } = cable.load;
  const alternating = {
    currentA: Math.abs(currentA),
    frequencyHz: choices.frequencyHz,
    phaseDeg: 0,
    harmonics: [],
  };
  if (liveCores(cable) === 3) return { kind: "ac3", ...alternating, sequence: "abc" };
  const supplyKind = kind === null ? choices.twoCoreKind : kind === "dc" ? "dc" : "ac1";
  return supplyKind === "dc" ? { kind: "dc", currentA } : { kind: "ac1", ...alternating };
}

function circuitName({ tag, from, to }: Cable): string {
  if (from !== "" && to !== "") return `${tag}: ${from} to ${to}`.slice(0, 300);
  return (from === "" && to === "" ? tag : `${tag}: ${from}${to}`).slice(0, 300);
}

function circuitOfCable(cable: Cable, choices: ScheduleChoices): Circuit {
  const blank = blankCircuit(newId("c"), circuitName(cable));
  const kind = cable.cores?.neutral === true ? "quad" : arrangementByLive[liveCores(cable)];
  const arrangement = arrangementOf(kind, blank.arrangement);
  const supply = supplyOfCable(cable, choices);
  if (cable.sizeMm2 === null) return { ...blank, arrangement, supply };
  const spacingM = touchingSpacingM(cable.sizeMm2);
  return {
    ...blank,
    arrangement: "spacingM" in arrangement && spacingM !== null ? { ...arrangement, spacingM } : arrangement,
    conductorRadiusM: conductorRadiusM(cable.sizeMm2) ?? blank.conductorRadiusM,
    supply,
  };
}

/** Adds the sound rows as circuits that wait to be traced, each with its line of the schedule as it was read. */
export function addScheduledCircuits(
  document: PlanDocument,
  rows: readonly ScheduleRow[],
  choices: ScheduleChoices,
): PlanDocument {
  const circuits: Circuit[] = [];
  const lines: NonNullable<PlanDocument["drawing"]["schedule"]> = [];
  for (const { cable, cells } of rows) {
    if (cable === null) continue;
    const circuit = circuitOfCable(cable, choices);
    circuits.push(circuit);
    lines.push({ circuitId: circuit.id, ...cells });
  }
  return {
    ...document,
    circuits: [...document.circuits, ...circuits],
    drawing: { ...document.drawing, schedule: [...(document.drawing.schedule ?? []), ...lines] },
  };
}

/** Tags of the schedule that the plan holds, in the order of their circuits. */
export const knownTags = (document: PlanDocument): string[] =>
  (document.drawing.schedule ?? []).map(({ tag }) => tag);
