import { describe, expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import type { Finding, ScreeningResult, Verdict } from "~/domain/screening-result";
import { blankCircuit } from "./edits/circuits";
import { entriesOf, governing, sourcesDrawn } from "./ledger";

const finding = (verdict: Verdict, budgetUsed: number, uncertaintyShare: number): Finding => ({
  limitId: "1",
  kind: "static",
  limit: 1e-6,
  value: budgetUsed * 1e-6,
  expandedUncertainty: uncertaintyShare * 1e-6,
  uncertaintyMethod: "first-order",
  unit: "T",
  budgetUsed,
  verdict,
  loadCaseId: null,
  field: { static: [0, 0, 0], alternating: [] },
  ellipse: null,
  contributions: [],
});

const sensor = (id: string): PlanDocument["sensors"][number] => ({
  id,
  name: `Sensor ${id}`,
  position: [0, 0, 0],
  axis: null,
  positionToleranceM: 0,
  background: null,
  limits: [{ id: "1", kind: "static", limitT: 1e-6 }],
});

const result = (sensors: ScreeningResult["sensors"]): ScreeningResult => ({
  format: "stillneedle-result",
  version: 1,
  inputHash: `sha256:${"0".repeat(64)}`,
  engineVersion: "1",
  verdict: "over",
  earthField: null,
  sensors,
  checks: { circulationError: null, openEnds: [], warnings: [] },
  leftOut: [],
});

describe("the ledger", () => {
  it("puts the worst verdict first, then the greatest value with its uncertainty", () => {
    const document = { ...emptyPlanDocument("Hall"), sensors: ["a", "b", "c", "d"].map(sensor) };
    const entries = entriesOf(
      document,
      result([
        { id: "a", verdict: "within", findings: [finding("within", 0.9, 0.05)] },
        { id: "b", verdict: "undecided", findings: [finding("undecided", 0.8, 0.3)] },
        { id: "c", verdict: "undecided", findings: [finding("undecided", 0.7, 0.5)] },
        { id: "d", verdict: "over", findings: [finding("over", 1.4, 0.1)] },
        { id: "gone", verdict: "over", findings: [finding("over", 9, 0)] },
      ]),
    );
    expect(entries.map(({ sensorId }) => sensorId)).toEqual(["d", "c", "b", "a"]);
  });

  it("takes the worst limit of a sensor", () => {
    const findings = [finding("within", 0.95, 0), finding("undecided", 0.6, 0.5)];
    expect(governing({ id: "a", verdict: "undecided", findings })?.budgetUsed).toBe(0.6);
    expect(governing({ id: "a", verdict: "within", findings: [] })).toBeNull();
  });

  it("counts the sources that carry something", () => {
    const loaded = { ...blankCircuit("c1", "K1"), supply: { kind: "dc" as const, currentA: 1 } };
    const traced = { path: [[0, 0, 0] as [number, number, number], [1, 0, 0] as [number, number, number]] };
    const circuits = [
      { ...loaded, ...traced },
      { ...loaded, id: "c2" },
      { ...blankCircuit("c3", "K3"), ...traced },
    ];
    expect(sourcesDrawn({ ...emptyPlanDocument("Hall"), circuits })).toBe(1);
  });
});
