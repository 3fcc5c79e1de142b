import { patched, type SingleChange } from "~/domain/clearing";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { SensorResult } from "~/domain/screening-result";
import { openEnds } from "../../checks/open-ends";
import { preparePlan, screenSensor, type PreparedPlan } from "../../prepared-plan";
import { RefusedDocumentError } from "../../refusal";
import type { Steps } from "../../steps";
import { reachGained, standingOf } from "../standing";
import { arrangementChanges } from "./arrangement-changes";
import { knowledgeChanges } from "./knowledge-changes";
import { circuitMoves, routeMoves } from "./moves";
import { phaseOrderChanges } from "./phase-orders";
import type { Proposal } from "./proposal";
import { spendersAt } from "./spenders";

/** Less than this share of a budget is no gain worth a line. */
const LEAST_GAIN = 1e-3;
/** So many of the best changes are looked at for what they spoil elsewhere, in plans of up to so many sensors. */
const LOOKED_AT = 12;
const MANY_SENSORS = 100;

/**
 * Every single change of the circuits that spend the budgets of the sensors at `targets`, each re-screened by the engine on the
 * changed document; most budget gained first, uncertainty included. Changes that gain nothing are left out.
 */
export function* singleChangesOf(
  document: PlanDocument,
  prepared: PreparedPlan,
  targets: readonly number[],
): Steps<SingleChange[]> {
  const before = targets.map((index) => screenSensor(prepared, index).result);
  const circuits = spendersAt(document, prepared, targets);
  const proposals = [
    ...circuits.flatMap((circuit) => ownChanges(document, circuit)),
    ...routesOf(document, circuits).flatMap((route) => routeMoves(document, route)),
    ...(yield* phaseOrderChanges(document, prepared, targets, circuits)),
  ];
  const changes: SingleChange[] = [];
  for (const [number, proposal] of proposals.entries()) {
    yield { done: number, total: proposals.length };
    const change = judged(document, prepared, targets, before, proposal);
    if (change && change.gained >= LEAST_GAIN) changes.push(change);
  }
  changes.sort((a, b) => b.gained - a.gained);
  return yield* withSpoils(document, prepared, targets, changes);
}

const ownChanges = (document: PlanDocument, circuit: Circuit): Proposal[] => [
  ...arrangementChanges(circuit),
  ...circuitMoves(document, circuit),
  ...knowledgeChanges(circuit),
];

const routesOf = ({ routes }: PlanDocument, circuits: readonly Circuit[]) =>
  routes.filter(({ id }) => circuits.some(({ route }) => route?.id === id));

function judged(
  document: PlanDocument,
  prepared: PreparedPlan,
  targets: readonly number[],
  before: readonly SensorResult[],
  { kind, words, ids, patch, movesSingles }: Proposal,
): SingleChange | null {
  const changed = preparedOrNull(patched(document, patch));
  if (!changed) return null;
  if (movesSingles && openEnds(changed.plan).length > openEnds(prepared.plan).length) return null;
  const after = targets.map((index) => screenSensor(changed, index).result);
  const sensors = before.map((result, i) => ({
    id: result.id,
    before: standingOf(result),
    after: standingOf(after[i] ?? result),
  }));
  const gained = before.reduce((sum, result, i) => sum + reachGained(result, after[i] ?? result), 0);
  return { kind, words, ids, patch, gained, sensors, spoils: null };
}

/** Null where the engine refuses the changed document: a move or spacing that does not fit the bends of a path. */
function preparedOrNull(document: PlanDocument): PreparedPlan | null {
  try {
    return preparePlan(document);
  } catch (error) {
    if (error instanceof RefusedDocumentError) return null;
    throw error;
  }
}

function* withSpoils(
  document: PlanDocument,
  prepared: PreparedPlan,
  targets: readonly number[],
  changes: SingleChange[],
): Steps<SingleChange[]> {
  const { sensors } = document;
  if (sensors.length > MANY_SENSORS) return changes;
  const within = new Set<number>();
  for (let index = 0; index < sensors.length; index++) {
    yield { done: index, total: sensors.length };
    if (targets.includes(index)) continue;
    if (standingOf(screenSensor(prepared, index).result).reach <= 1) within.add(index);
  }
  for (const [number, change] of changes.slice(0, LOOKED_AT).entries()) {
    yield { done: number, total: LOOKED_AT };
    const changed = preparedOrNull(patched(document, change.patch));
    if (!changed) continue;
    change.spoils = [...within].flatMap((index) => {
      const { result } = screenSensor(changed, index);
      return standingOf(result).reach > 1 ? [result.id] : [];
    });
  }
  return changes;
}
