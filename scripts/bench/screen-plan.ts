import { parsePlanDocument } from "~/domain/plan-document/parse";
import {
  emptyPlanDocument,
  type PlanDocument,
  type PlanDocumentInput,
} from "~/domain/plan-document/plan-document";
import { seededRandom } from "./measure";

export const CIRCUITS = 200;
export const SENSORS = 500;
export const LOAD_CASES = 8;
const ROUTES = 20;
const VERTICES = 12;

type CircuitInput = PlanDocumentInput["circuits"][number];

/**
 * A hall of 60 m × 40 m: circuits in routes of their own or shared ones, half of them DC pairs, the rest three-phase with harmonics;
 * every third stray current is stated, the others are not known. Sensors stand on a grid, most of them clear of conductors.
 */
export function screenPlan(): PlanDocument {
  const random = seededRandom(11);
  const path = (heightM: number): [number, number, number][] => {
    let [x, y] = [60 * random(), 40 * random()];
    return Array.from({ length: VERTICES }, (_, leg) => {
      if (leg % 2 === 0) x = (x + 10 + 20 * random()) % 60;
      else y = (y + 8 + 12 * random()) % 40;
      return [x, y, heightM];
    });
  };
  const routes = Array.from({ length: ROUTES }, (_, i) => ({
    id: `r${i}`,
    name: `Tray ${i}`,
    path: path(3 + random()),
  }));
  const circuits = Array.from({ length: CIRCUITS }, (_, i): CircuitInput => {
    const supplied: Pick<CircuitInput, "arrangement" | "supply"> =
      i % 2 === 0
        ? {
            arrangement: { kind: "pair", spacingM: 0.03 },
            supply: { kind: "dc", currentA: Math.round(20 + 180 * random()) },
          }
        : {
            arrangement: { kind: i % 4 === 1 ? "trefoil" : "flat", spacingM: 0.04 },
            supply: {
              kind: "ac3",
              currentA: Math.round(30 + 200 * random()),
              frequencyHz: 50,
              harmonics: [
                { order: 5, percent: 6 },
                { order: 7, percent: 4 },
              ],
            },
          };
    const placed =
      i % 5 === 0
        ? { path: path(3 + random()) }
        : { route: { id: `r${i % ROUTES}`, placeM: [0.1 * Math.floor(i / ROUTES), 0] as [number, number] } };
    return {
      id: `c${i}`,
      name: `Circuit ${i}`,
      source: "mains",
      ...supplied,
      ...placed,
      conductorRadiusM: 0.006,
      strayCurrentA: i % 3 === 0 ? 0 : null,
      positionToleranceM: 0.05,
      spacingTolerancePercent: i % 4 === 0 ? 5 : 0,
    };
  });
  const sensors = Array.from({ length: SENSORS }, (_, i): PlanDocumentInput["sensors"][number] => ({
    id: `s${i}`,
    name: `Probe ${i}`,
    position: [1 + 58 * random(), 1 + 38 * random(), 0.5 + 1.5 * random()],
    positionToleranceM: 0.02,
    limits: [
      { kind: "static", limitT: 2e-6 },
      { kind: "alternating", limitT: 1e-6, bandHz: [10, 1000] },
    ],
  }));
  const loadCases = Array.from({ length: LOAD_CASES }, (_, i) => ({
    id: `l${i}`,
    name: `Case ${i}`,
    factors: Object.fromEntries(circuits.map(({ id }) => [id, i === 0 ? 1 : Math.round(4 * random()) / 4])),
  }));
  const parsed = parsePlanDocument({ ...emptyPlanDocument("Bench"), routes, circuits, sensors, loadCases });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults.slice(0, 5)));
  return parsed.document;
}
