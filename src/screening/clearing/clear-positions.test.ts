import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { clearingPlan, clearingPlans } from "../../../tests/fixtures/clearing-plans";
import { nearestWithinOnGrid, screenedAt } from "../../../tests/oracles/nearest-clear";
import { clearing } from "./clearing";
import { isInRegion, regionOf } from "./region";

const positionsOf = (document: Parameters<typeof clearing>[0]) =>
  clearing(document, { sensorIds: ["s1"], parts: ["positions"] }).sensors[0]?.positions ?? null;

const pair = (currentA: number, heightM = 1.1) => ({
  id: "c0",
  name: "String",
  path: [
    [0, 4, heightM],
    [12, 4, heightM],
  ] as [number, number, number][],
  arrangement: { kind: "pair" as const, spacingM: 0.05 },
  conductorRadiusM: 0.005,
  supply: { kind: "dc" as const, currentA },
  strayCurrentA: 0,
});
const probe = (y: number, rest = {}) => ({
  id: "s1",
  name: "Probe",
  position: [6, y, 1.1] as [number, number, number],
  limits: [{ kind: "static" as const, limitT: 1e-6 }],
  ...rest,
});

describe("clear positions", () => {
  it("are within by a whole screening, inside the region, where distance and bearing say", () => {
    fc.assert(
      fc.property(clearingPlans, (document) => {
        const found = positionsOf(document);
        const sensor = document.sensors[0];
        if (!found || !sensor) return;
        const region = regionOf(document, sensor);
        const distances = found.suggestions.map(({ distanceM }) => distanceM);
        expect(distances).toEqual([...distances].sort((a, b) => a - b));
        expect(found.suggestions.length).toBeLessThanOrEqual(5);
        for (const { position, distanceM, bearingDeg, riseM, reach, butForWaiting } of found.suggestions) {
          const screened = screenedAt(document, "s1", position);
          expect([screened.verdict, butForWaiting]).toEqual(["within", false]);
          const most = Math.max(...screened.findings.map((f) => (f.value + f.expandedUncertainty) / f.limit));
          expect(reach).toBe(most);
          expect(isInRegion(region, position)).toBe(true);
          const [dx, dy, dz] = [0, 1, 2].map((i) => (position[i] ?? 0) - (sensor.position[i] ?? 0)) as [
            number,
            number,
            number,
          ];
          expect(distanceM).toBeCloseTo(Math.hypot(dx, dy, dz), 9);
          expect(riseM).toBeCloseTo(dz, 9);
          if (bearingDeg === null) continue;
          // True north in the plan is (−sin β, cos β).
          const turn = ((bearingDeg - document.frame.northBearingDeg) * Math.PI) / 180;
          const level = Math.hypot(dx, dy);
          expect(dx).toBeCloseTo(level * Math.sin(turn), 6);
          expect(dy).toBeCloseTo(level * Math.cos(turn), 6);
        }
      }),
      { numRuns: 60 },
    );
  }, 60_000);

  it(
    "are no further than the nearest point of a grid that a whole screening finds within",
    { timeout: 60_000 },
    () => {
      for (const document of [
        clearingPlan([pair(120)], [probe(4.4)]),
        clearingPlan(
          [
            pair(120),
            {
              ...pair(90, 2.2),
              id: "c1",
              path: [
                [9, 0, 2.2],
                [9, 8, 2.2],
              ],
            },
          ],
          [probe(4.6)],
        ),
      ]) {
        const gridM = nearestWithinOnGrid(document, "s1", 0.1, [-3, -3, 15, 11]);
        const level = positionsOf(document)?.suggestions.find(({ riseM }) => riseM === 0);
        expect(level?.distanceM).toBeLessThanOrEqual(gridM + 0.02);
        expect(level?.distanceM).toBeGreaterThan(gridM - 0.15);
      }
    },
  );

  it("stay in the sensor's zone, and say how far was looked where it holds none", () => {
    const outline = [
      [5.5, 4.1],
      [6.5, 4.1],
      [6.5, 4.9],
      [5.5, 4.9],
    ] as [number, number][];
    const drawing = { zones: [{ id: "z", name: "Dock", outline }] };
    const found = positionsOf(clearingPlan([pair(1200)], [probe(4.5)], { drawing }));
    expect(found?.suggestions).toEqual([]);
    expect(found?.searched).toMatchObject({
      region: "zone",
      zoneName: "Dock",
      fromHeightM: 0,
      toHeightM: 2.5,
    });
    expect(found?.searched.furthestM).toBeCloseTo(Math.hypot(0.5, 0.4, 1.4), 9);
  });

  it("say where only something that waits keeps them from being within", () => {
    const waits = { ...pair(1), id: "c9", path: null, supply: null };
    const found = positionsOf(clearingPlan([pair(120), waits], [probe(4.4)]));
    expect(found?.suggestions.length).toBeGreaterThan(0);
    for (const { position, butForWaiting } of found?.suggestions ?? []) {
      const document = clearingPlan([pair(120), waits], [probe(4.4)]);
      expect([screenedAt(document, "s1", position).verdict, butForWaiting]).toEqual(["undecided", true]);
      expect(screenedAt(clearingPlan([pair(120)], [probe(4.4)]), "s1", position).verdict).toBe("within");
    }
  });
});
