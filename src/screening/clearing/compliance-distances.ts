import type { CircuitDistances, Clearing } from "~/domain/clearing";
import type { Circuit } from "~/domain/plan-document/circuit";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { sensor as sensorSchema, type Sensor } from "~/domain/plan-document/sensor";
import { sectionFrames } from "~/field/section-frames";
import { scale, type Vector } from "~/field/vector";
import type { Steps } from "../steps";
import { preparePlan } from "../prepared-plan";
import { TABLED_LIMITS, type TabledLimit } from "./distance-limits";
import { OwnField } from "./own-field";
import { worstDistance } from "./worst-distance";

/** Half the length of the straight line that stands for a leg, and how far off it distances are looked for, metres. */
const HALF_LENGTH_M = 50_000;
export const REACH_M = 1000;
/** Distances are stated in steps of this, rounded up (ISO 25862). */
const STATED_STEP_M = 0.05;

/**
 * How far from each circuit's centre line its own field, at its current as entered, keeps the compass-safe distances and every
 * catalogue limit: across its longest leg in the worst direction, as if that leg ran on straight without end. Stated stray currents
 * are in it, unstated ones, uncertainties and load cases are not. Circuits without a path or a current have no line.
 */
export function* complianceDistances(document: PlanDocument): Steps<NonNullable<Clearing["distances"]>> {
  const circuits: CircuitDistances[] = [];
  const known = new Map<string, CircuitDistances["entries"]>();
  for (const [number, circuit] of document.circuits.entries()) {
    yield { done: number, total: document.circuits.length };
    const direction = longestDirection(document, circuit);
    if (!direction || !circuit.supply) continue;
    const { arrangement, conductorRadiusM, supply, strayCurrentA, strayAngleDeg, shieldingFactor } = circuit;
    const key = JSON.stringify([
      direction,
      arrangement,
      conductorRadiusM,
      supply,
      strayCurrentA,
      strayAngleDeg,
      shieldingFactor,
    ]);
    const entries = known.get(key) ?? entriesOf(circuit, direction);
    known.set(key, entries);
    circuits.push({ circuitId: circuit.id, entries });
  }
  return { limits: TABLED_LIMITS.map(({ shown }) => shown), circuits, reachM: REACH_M };
}

function entriesOf(circuit: Circuit, direction: Vector): CircuitDistances["entries"] {
  const isDc = circuit.supply?.kind === "dc";
  const limits = TABLED_LIMITS.filter(({ limit }) => (limit.kind === "alternating") !== isDc);
  const field = new OwnField(straightPlan(circuit, direction, limits), limits);
  return limits.map(({ shown }, index) => {
    const distanceM = worstDistance((angleRad, radiusM) => field.shareAt(index, angleRad, radiusM), {
      fromM: field.insideM,
      reachM: REACH_M,
    });
    return {
      limitId: shown.id,
      distanceM,
      statedM: distanceM === null ? null : roundedUp(distanceM),
    };
  });
}

const roundedUp = (distanceM: number): number =>
  Number((Math.ceil(distanceM / STATED_STEP_M - 1e-9) * STATED_STEP_M).toFixed(2));

/** The circuit by itself on a straight line through the origin, with a sensor that has the limits. */
function straightPlan(circuit: Circuit, direction: Vector, limits: readonly TabledLimit[]) {
  const sensor: Sensor = sensorSchema.parse({
    id: "observer",
    name: "",
    position: [0, 0, 0],
    limits: limits.map(({ limit }) => limit),
  });
  const path = [-HALF_LENGTH_M, HALF_LENGTH_M].map(
    (at) => [...scale(direction, at)] as [number, number, number],
  );
  const straight: Circuit = {
    ...circuit,
    route: null,
    path,
    positionToleranceM: 0,
    spacingTolerancePercent: 0,
  };
  return preparePlan({ ...emptyPlanDocument(""), circuits: [straight], sensors: [sensor] });
}

/** Direction of the longest leg of a circuit's centre line; null where it has none. */
function longestDirection(document: PlanDocument, circuit: Circuit): Vector | null {
  const path = circuit.path ?? document.routes.find(({ id }) => id === circuit.route?.id)?.path;
  const framed = path && sectionFrames(path);
  if (!framed?.ok) return null;
  const [first, ...others] = framed.frames.legs;
  if (!first) return null;
  return others.reduce((longest, leg) => (leg.lengthM > longest.lengthM + 1e-9 ? leg : longest), first).t;
}
