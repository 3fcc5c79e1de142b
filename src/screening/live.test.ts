import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { LiveScreener } from "./live";
import { screen } from "./screen";
import { runSteps } from "./steps";

type Point = [number, number, number];

/** Two pairs in a route and one beside it, their places and stray currents uncertain, so that some findings are drawn. */
function planOf(sensorsAt: readonly Point[], vertex: Point, rmsT: number): PlanDocument {
  const supply = { kind: "dc" as const, currentA: 100 };
  const pair = { arrangement: { kind: "pair" as const, spacingM: 0.03 }, conductorRadiusM: 0.006, supply };
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Live"),
    routes: [{ id: "r", name: "Tray", path: [[-5, 0, 0], vertex, [5, 6, 0]] }],
    circuits: [
      { ...pair, id: "a", name: "A", route: { id: "r" }, positionToleranceM: 0.1 },
      { ...pair, id: "b", name: "B", route: { id: "r", placeM: [0.2, 0] } },
      {
        ...pair,
        id: "c",
        name: "C",
        path: [
          [-5, 9, 0],
          [5, 9, 0],
        ],
      },
    ],
    sensors: sensorsAt.map((position, i) => ({
      id: `s${i}`,
      name: `Probe ${i}`,
      position,
      background: i === 0 ? { alternating: [{ frequencyHz: 50, rmsT }] } : null,
      limits: [
        { kind: "static", limitT: 1e-6 },
        { kind: "alternating", limitT: 1e-7, bandHz: [10, 100] },
      ],
    })),
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

const coordinate = fc.integer({ min: -8, max: 8 }).map((half) => half / 2);
const point = fc.tuple(coordinate, coordinate, coordinate) as fc.Arbitrary<Point>;
const edit = fc.oneof(
  { weight: 4, arbitrary: fc.record({ sensor: fc.nat(2), to: point }) },
  { weight: 1, arbitrary: fc.record({ vertexX: fc.constantFrom(0, 1) }) },
  { weight: 1, arbitrary: fc.record({ rmsT: fc.constantFrom(1e-8, 2e-8) }) },
  { weight: 1, arbitrary: fc.record({ dropLast: fc.constant(true) }) },
);

describe("LiveScreener", () => {
  it("gives for every document of a run of edits what a fresh screening gives", () => {
    const starts = fc.array(point, { minLength: 1, maxLength: 3 });
    fc.assert(
      fc.property(starts, fc.array(edit, { minLength: 1, maxLength: 4 }), (start, edits) => {
        const live = new LiveScreener();
        let [sensors, vertex, rmsT] = [start, [0, 6, 0] as Point, 1e-8];
        const check = () => {
          const document = planOf(sensors, vertex, rmsT);
          expect(JSON.stringify(runSteps(live.steps(document), {}))).toBe(JSON.stringify(screen(document)));
        };
        check();
        for (const change of edits) {
          if ("to" in change) sensors = sensors.map((at, i) => (i === change.sensor ? change.to : at));
          else if ("vertexX" in change) vertex = [change.vertexX, 6, 0];
          else if ("rmsT" in change) rmsT = change.rmsT;
          else if (sensors.length > 1) sensors = sensors.slice(0, -1);
          check();
        }
      }),
      { numRuns: 15 },
    );
  }, 120_000);

  it("judges only the sensor that moved", () => {
    const live = new LiveScreener();
    const [still, from, to] = [
      [1, 3, 1],
      [2, 3, 1],
      [2, 4, 1],
    ] as [Point, Point, Point];
    runSteps(live.steps(planOf([still, from], [0, 6, 0], 1e-8)), {});
    const steps = live.steps(planOf([still, to], [0, 6, 0], 1e-8));
    expect([...steps].map(({ done }) => done)).toEqual([1, 2]);
  });
});
