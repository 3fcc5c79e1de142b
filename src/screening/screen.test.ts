import { describe, expect, it } from "vitest";
import { cautions } from "~/domain/cautions";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import type { PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { screeningResultSchema, type Finding } from "~/domain/screening-result";
import { MU_0 } from "~/domain/units";
import { RefusedDocumentError } from "./refusal";
import { screen } from "./screen";

type CircuitInput = PlanDocumentInput["circuits"][number];
type SensorInput = PlanDocumentInput["sensors"][number];

function planned(
  circuits: Partial<CircuitInput>[],
  sensor: Partial<SensorInput>,
  rest: Partial<PlanDocumentInput> = {},
) {
  const parsed = parsePlanDocument({
    format: "stillneedle-plan",
    version: 1,
    name: "Test bay",
    frame: { northBearingDeg: 0 },
    circuits: circuits.map((circuit, index) => ({
      id: `c${index + 1}`,
      name: `Circuit ${index + 1}`,
      path: [
        [-5000, 0, 0],
        [5000, 0, 0],
      ],
      arrangement: { kind: "single" },
      conductorRadiusM: 0.002,
      supply: { kind: "dc", currentA: 10 },
      currentTolerancePercent: 0,
      ...(circuit.arrangement && circuit.arrangement.kind !== "single" ? { strayCurrentA: 0 } : {}),
      ...circuit,
    })),
    sensors: [
      { id: "s1", name: "Probe", position: [0, 1, 0], limits: [{ kind: "static", limitT: 1e-6 }], ...sensor },
    ],
    ...rest,
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

function finding(...args: Parameters<typeof planned>): Finding {
  const result = screeningResultSchema.parse(screen(planned(...args)));
  const [first] = result.sensors[0]?.findings ?? [];
  if (!first) throw new Error("no finding");
  return first;
}

const wire = (currentA: number, rM: number) => (MU_0 * currentA) / (2 * Math.PI * rM);

describe("screen", () => {
  it("judges a long wire against a static limit", () => {
    const found = finding([{}], {});
    expect(found.value).toBeCloseTo(wire(10, 1), 11);
    expect(found.field.static[2]).toBeCloseTo(wire(10, 1), 11);
    expect(found).toMatchObject({
      verdict: "over",
      unit: "T",
      loadCaseId: null,
      contributions: [{ id: "c1", part: 1 }],
    });
    expect(found.budgetUsed).toBeCloseTo(2, 5);
  });

  it("keeps undecided within the guard band of the current's tolerance", () => {
    const at = (limitT: number) =>
      finding([{ currentTolerancePercent: 10 }], { limits: [{ kind: "static", limitT }] });
    const found = at(2.1e-6);
    expect(found.expandedUncertainty).toBeCloseTo((2 * 0.1 * wire(10, 1)) / Math.sqrt(3), 11);
    expect([at(2.1e-6).verdict, at(2.3e-6).verdict, at(1.7e-6).verdict]).toEqual([
      "undecided",
      "within",
      "over",
    ]);
  });

  it("correlates the currents of one load group", () => {
    const pairUp = (loadGroup: string | null) =>
      finding(
        [
          { currentTolerancePercent: 10, loadGroup },
          {
            currentTolerancePercent: 10,
            loadGroup,
            path: [
              [5000, 0, 0],
              [-5000, 0, 0],
            ],
            supply: { kind: "dc", currentA: 5 },
          },
        ],
        {},
      );
    expect(pairUp("g").expandedUncertainty).toBeCloseTo((0.2 * wire(5, 1)) / Math.sqrt(3), 11);
    expect(pairUp(null).expandedUncertainty).toBeCloseTo(
      (0.2 * wire(Math.hypot(10, 5), 1)) / Math.sqrt(3),
      10,
    );
    expect(pairUp("g").contributions.map(({ part }) => Math.round(part))).toEqual([2, -1]);
  });

  it("lets the load case with the greatest verdict and reach govern", () => {
    const loadCases = [
      { id: "normal", name: "Normal", factors: { c1: 0.2 } },
      { id: "reversed", name: "Reversed", factors: { c1: -0.9 } },
      { id: "peak", name: "Peak", factors: { c1: 0.9 } },
    ];
    const found = finding([{}], {}, { loadCases });
    expect(found.loadCaseId).toBe("reversed");
    expect(found.value).toBeCloseTo(0.9 * wire(10, 1), 11);
    const swing = finding([{}], { limits: [{ kind: "swing", limitT: 1e-6 }] }, { loadCases });
    expect(swing).toMatchObject({ loadCaseId: null, verdict: "over" });
    expect(swing.value).toBeCloseTo(1.8 * wire(10, 1), 11);
  });

  it("adds sources of unknown phase by magnitude, or root-sum-squared when typical, and locked ones as phasors", () => {
    const ac = (currentA: number, source: string, phaseDeg = 0) => ({
      source,
      supply: { kind: "ac1" as const, currentA, frequencyHz: 50, phaseDeg },
    });
    const limits: SensorInput["limits"] = [{ kind: "alternating", limitT: 1e-6, bandHz: [50, 50] }];
    const value = (circuits: Partial<CircuitInput>[], rest = {}) => finding(circuits, { limits }, rest).value;
    expect(value([ac(3, "a"), ac(4, "b")])).toBeCloseTo(wire(7, 1), 11);
    expect(value([ac(3, "a"), ac(4, "b")], { unknownPhase: "typical" })).toBeCloseTo(wire(5, 1), 11);
    expect(value([ac(3, "m"), ac(4, "m", 90)])).toBeCloseTo(wire(5, 1), 11);
    expect(value([ac(3, "m"), ac(3, "m", 180)])).toBeCloseTo(0, 15);
  });

  it("turns a compass by the horizontal disturbance across magnetic north", () => {
    const earthField = { mode: "stated" as const, horizontalT: 2e-5, verticalT: 4e-5, declinationDeg: 0 };
    // A wire 1 m below along north pushes the needle across it.
    const path: CircuitInput["path"] = [
      [0, -5000, -1],
      [0, 5000, -1],
    ];
    const found = finding(
      [{ path }],
      { position: [0, 0, 0], limits: [{ kind: "heading", limitDeg: 10 }] },
      { earthField },
    );
    expect(found.value).toBeCloseTo((Math.atan2(wire(10, 1), 2e-5) * 180) / Math.PI, 5);
    // Along east it adds to the horizontal intensity and turns nothing.
    const across: CircuitInput["path"] = [
      [5000, 0, -1],
      [-5000, 0, -1],
    ];
    expect(
      finding(
        [{ path: across }],
        { position: [0, 0, 0], limits: [{ kind: "heading", limitDeg: 10 }] },
        { earthField },
      ).value,
    ).toBeCloseTo(0, 9);
  });

  it("compares the component along a sensor's axis", () => {
    expect(finding([{}], { axis: [0, 0, -3] }).value).toBeCloseTo(wire(10, 1), 11);
    expect(finding([{}], { axis: [0, 1, 0] }).value).toBeCloseTo(0, 15);
  });

  it("caps verdicts while something drawn waits for its path or current, and lists it", () => {
    const document = planned([{ supply: { kind: "dc", currentA: 0 } }, { path: null, supply: null }], {});
    const result = screen(document);
    expect(result.verdict).toBe("undecided");
    expect(result.checks.warnings.join()).toMatch(/Circuit 2.*not traced and has no current yet/);
  });

  it("states open ends with their place and checks the circulation", () => {
    const result = screen(
      planned(
        [
          {
            path: [
              [0, 0, 0],
              [12, 0, 0],
              [12, 6, 2],
            ],
          },
        ],
        {},
      ),
    );
    expect(result.checks.warnings.join()).not.toMatch(/way back/);
    expect(result.leftOut).toEqual(expect.arrayContaining([...cautions]));
    expect(result.checks.openEnds).toEqual([
      { at: [0, 0, 0], currentA: 10, circuitIds: ["c1"] },
      { at: [12, 6, 2], currentA: 10, circuitIds: ["c1"] },
    ]);
    expect(result.checks.circulationError).toBeLessThan(1e-6);
    expect(result.checks.circulationError).toBeGreaterThan(0);
  });

  it("sums its contributions to 1", () => {
    const found = finding(
      [
        {
          arrangement: { kind: "pair", spacingM: 0.03 },
          path: [
            [0, 0, 0],
            [9, 0, 0],
            [9, 5, 1],
          ],
        },
        {
          path: [
            [0, 3, 1],
            [4, 3, 1],
          ],
          supply: { kind: "dc", currentA: -3 },
        },
      ],
      { position: [3, 1, 2] },
    );
    expect(found.contributions.reduce((sum, { part }) => sum + part, 0)).toBeCloseTo(1, 12);
  });

  it("gives the same bytes for the same document and a hash that the drawing has no part in", () => {
    const document = planned([{}], {});
    expect(JSON.stringify(screen(document))).toBe(JSON.stringify(screen(structuredClone(document))));
    expect(screen({ ...document, drawing: { gridM: 0.5 } }).inputHash).toBe(screen(document).inputHash);
    expect(screen({ ...document, name: "Other" }).inputHash).not.toBe(screen(document).inputHash);
  });

  it("refuses with paths what parses and cannot be computed", () => {
    const refused = (run: () => unknown) => {
      try {
        run();
      } catch (error) {
        if (error instanceof RefusedDocumentError) return error.faults.map(({ path }) => path);
        throw error;
      }
      return [];
    };
    expect(
      refused(() =>
        screen(
          planned(
            [
              {
                path: [
                  [0, 0, 0],
                  [1, 0, 0],
                  [0, 0, 0],
                ],
              },
            ],
            {},
          ),
        ),
      ),
    ).toEqual(["circuits[0].path"]);
    const earthField = {
      mode: "model" as const,
      latitudeDeg: 54,
      longitudeDeg: 8,
      altitudeM: 0,
      date: "2035-01-01",
    };
    expect(refused(() => screen(planned([{}], {}, { earthField })))).toEqual(["earthField.date"]);
  });

  it("stops when it is aborted", () => {
    const signal = AbortSignal.abort(new Error("no longer wanted"));
    expect(() => screen(planned([{}], {}), { signal })).toThrow("no longer wanted");
  });
});
