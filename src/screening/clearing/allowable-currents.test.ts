import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { clearingPlan, clearingPlans } from "../../../tests/fixtures/clearing-plans";
import { screen } from "../screen";
import { clearing } from "./clearing";
import { scaledSupply } from "./scaled-supply";

const currentsOf = (document: PlanDocument) =>
  clearing(document, { sensorIds: ["s1"], parts: ["currents"] }).sensors[0];

function withCurrent(document: PlanDocument, circuitId: string, factor: number): PlanDocument {
  const circuits = document.circuits.map((circuit) =>
    circuit.id === circuitId && circuit.supply
      ? { ...circuit, supply: scaledSupply(circuit.supply, factor) }
      : circuit,
  );
  return { ...document, circuits };
}

/** The findings of s1 for one limit, or all of them, with one circuit's current times a factor, by a whole screening. */
function findingsAt(document: PlanDocument, circuitId: string, limitId: string | null, factor: number) {
  const { sensors } = screen(withCurrent(document, circuitId, factor));
  const findings = sensors.find(({ id }) => id === "s1")?.findings ?? [];
  return findings.filter((finding) => limitId === null || finding.limitId === limitId);
}

const clears = (findings: ReturnType<typeof findingsAt>) =>
  findings.every(({ value, expandedUncertainty, limit }) => value + expandedUncertainty <= limit);

describe("the allowable current of each circuit alone", () => {
  it("clears by a whole screening, and one per cent more does not where it is the edge", () => {
    let edges = 0;
    fc.assert(
      fc.property(clearingPlans, (document) => {
        for (const { circuitId, limitId, presentA, atMost, between } of currentsOf(document)?.currents ??
          []) {
          if (atMost) {
            expect(atMost.currentA).toBeCloseTo(atMost.factor * presentA, 6);
            expect(clears(findingsAt(document, circuitId, limitId, atMost.factor))).toBe(true);
            const more = findingsAt(document, circuitId, limitId, atMost.factor * 1.01);
            const first = more.every(({ uncertaintyMethod }) => uncertaintyMethod === "first-order");
            if (!first || atMost.factor < 0.01) continue;
            expect(clears(more)).toBe(false);
            edges += 1;
          } else if (between) {
            for (const currentA of [between.fromA, between.toA])
              expect(clears(findingsAt(document, circuitId, limitId, currentA / presentA))).toBe(true);
          } else {
            expect(clears(findingsAt(document, circuitId, limitId, 0))).toBe(false);
          }
        }
      }),
      { numRuns: 120 },
    );
    expect(edges).toBeGreaterThan(10);
  }, 60_000);

  const wire = (id: string, y: number, currentA: number, rest = {}) => ({
    id,
    name: id,
    path: [
      [-4000, y, 1],
      [4000, y, 1],
    ] as [number, number, number][],
    arrangement: { kind: "single" as const },
    conductorRadiusM: 0.002,
    supply: { kind: "dc" as const, currentA },
    currentTolerancePercent: 0,
    ...rest,
  });
  const probe = {
    id: "s1",
    name: "Probe",
    position: [0, 1, 1] as [number, number, number],
    limits: [{ id: "dc", kind: "static" as const, limitT: 1e-6 }],
  };

  it("is what the field of a long wire says", () => {
    // 2e-7 · I / 1 m = 1 µT at 5 A; two wires either side relieve each other.
    const [alone] = currentsOf(clearingPlan([wire("c0", 0, 20)], [probe]))?.currents ?? [];
    expect(alone?.atMost?.currentA).toBeCloseTo(5, 2);
    const relieved = clearingPlan([wire("c0", 0, 20), wire("c1", 2, 10)], [probe]);
    const currents = currentsOf(relieved)?.currents ?? [];
    expect(currents.find((c) => c.circuitId === "c0")).toMatchObject({ atMost: null });
    expect(currents.find((c) => c.circuitId === "c0")?.between?.fromA).toBeCloseTo(5, 2);
    expect(currents.find((c) => c.circuitId === "c0")?.between?.toA).toBeCloseTo(15, 2);
  });

  it("of a circuit that waits for its current fills the budget", () => {
    const document = clearingPlan(
      [wire("c0", 0, 2), wire("c1", -1, 0, { supply: null, currentTolerancePercent: null })],
      [probe],
    );
    const waiting = currentsOf(document)?.waiting ?? [];
    expect(waiting.map(({ circuitId, kind }) => [circuitId, kind])).toEqual([["c1", "dc"]]);
    // 0.4 µT are spent; 0.6 µT at 2 m are 6 A, with 10 % (load list) of it uncertain: U = 2 · 0.1 / √3.
    expect(waiting[0]?.fullAtA).toBeCloseTo(6 / (1 + 0.2 / Math.sqrt(3)), 2);
  });
});
