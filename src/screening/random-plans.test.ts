import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { screeningResultSchema } from "~/domain/screening-result";
import { RefusedDocumentError } from "./refusal";
import { screen } from "./screen";

/** Coarse on purpose: points that coincide, lie on conductors, at centres and on axes come up often. */
const coordinate = fc.integer({ min: -3, max: 3 }).map((half) => half / 2);
const point = fc.tuple(coordinate, coordinate, coordinate);
const direction = point.filter((vector) => Math.hypot(...vector) > 0);
const fraction = fc.integer({ min: 0, max: 4 }).map((quarter) => quarter / 4);
const harmonics = fc.constantFrom(
  [],
  [
    { order: 3, percent: 20 },
    { order: 5, percent: 10, angleDeg: 30 },
  ],
);
const single = fc.constantFrom(
  { kind: "dc" as const, currentA: -20 },
  { kind: "dc" as const, currentA: 0 },
  { kind: "ac1" as const, currentA: 30, frequencyHz: 50, phaseDeg: 10 },
  { kind: "ac1" as const, currentA: 30, frequencyHz: 50.1 },
);

const wired = fc.oneof(
  fc.record({
    arrangement: fc.constantFrom<PlanDocumentInput["circuits"][number]["arrangement"]>(
      { kind: "pair", spacingM: 0.1, parallel: { sets: 2, pitchM: 0.2 } },
      { kind: "twisted-pair", spacingM: 0.02, layM: 0.2, rollDeg: 30 },
      {
        kind: "custom",
        conductors: [
          { offsetM: [0, 0], of: "go", fraction: 1 },
          { offsetM: [0.1, 0], of: "return", fraction: 1 },
        ],
      },
    ),
    supply: single,
    strayCurrentA: fc.constantFrom(null, 0, 2),
  }),
  fc.record({
    arrangement: fc.constantFrom<PlanDocumentInput["circuits"][number]["arrangement"]>(
      { kind: "quad", spacingM: 0.05 },
      { kind: "flat-n", spacingM: 0.05, parallel: { sets: 2, pitchM: 0.3, phaseOrders: ["abc", "cba"] } },
    ),
    supply: harmonics.map((list) => ({
      kind: "ac3" as const,
      currentA: 100,
      frequencyHz: 50,
      harmonics: list,
    })),
    strayCurrentA: fc.constantFrom(null, 3),
  }),
  fc.record({ arrangement: fc.constant({ kind: "single" as const }), supply: single }),
);

const circuit = fc
  .tuple(wired, fc.array(point, { minLength: 2, maxLength: 4 }), fraction, fraction)
  .map(([rest, path, position, spacing]) => ({
    ...rest,
    path,
    conductorRadiusM: 0.01,
    positionToleranceM: position / 5,
    spacingTolerancePercent: 20 * spacing,
  }));

const equipment = fc.oneof(
  fc.record({ centre: point, axis: direction, supply: single }).map((rest) => ({
    ...rest,
    kind: "coil" as const,
    turns: 3,
    radiusM: 0.5,
    lengthM: 0.5,
    tolerancePercent: 5,
  })),
  fc.record({ centre: point, axis: direction, supply: single, compensated: fc.boolean() }).map((rest) => ({
    ...rest,
    kind: "toroid" as const,
    turns: 50,
    meanRadiusM: 0.5,
    minorRadiusM: 0.1,
  })),
  fc
    .record({
      centre: point,
      direction: fc.option(direction),
      frequencyHz: fc.constantFrom(0, 50),
      tolerancePercent: fc.constantFrom(0, 30),
    })
    .map((rest) => ({ ...rest, kind: "dipole" as const, reading: { distanceM: 0.5, fieldT: 1e-5 } })),
);

const limits: PlanDocumentInput["sensors"][number]["limits"] = [
  { kind: "static", limitT: 1e-6 },
  { kind: "alternating", limitT: 1e-6, bandHz: [10, 1000] },
  { kind: "alternating", limitT: 1e-6, bandHz: [10, 200], measure: "peakToPeak" },
  { kind: "swing", limitT: 1e-6 },
  { kind: "heading", limitDeg: 5 },
  { kind: "gradient", limitTPerM: 1e-6 },
  { kind: "range", limitT: 1e-4 },
];

const sensor = fc.record({
  position: point,
  axis: fc.option(direction),
  positionToleranceM: fraction.map((part) => part / 10),
  background: fc.constantFrom(
    null,
    { staticT: [1e-7, 0, 2e-7] as [number, number, number], expandedUncertaintyT: 1e-8 },
    {
      staticT: 3e-7,
      alternating: [
        { frequencyHz: 50, rmsT: 1e-7 },
        { frequencyHz: 16.7, rmsT: 1e-8 },
      ],
    },
  ),
});

const plan = fc.record({
  circuits: fc.array(circuit, { maxLength: 2 }),
  equipment: fc.array(equipment, { maxLength: 2 }),
  sensor,
  unknownPhase: fc.constantFrom("worst-case" as const, "typical" as const),
  factor: fc.constantFrom(0, 0.5),
});

const earthField = {
  mode: "model" as const,
  latitudeDeg: 54.2,
  longitudeDeg: 7.9,
  altitudeM: 10,
  date: "2026-12-01",
};

describe("screen", () => {
  it("judges any valid plan to finite figures whose contributions sum to 1, or refuses it with paths", () => {
    fc.assert(
      fc.property(plan, ({ circuits, equipment: items, sensor: probe, unknownPhase, factor }) => {
        const parsed = parsePlanDocument({
          ...emptyPlanDocument("Random"),
          earthField,
          unknownPhase,
          circuits: circuits.map((entry, i) => ({ id: `c${i}`, name: `c${i}`, ...entry })),
          equipment: items.map((entry, i) => ({ id: `e${i}`, name: `e${i}`, ...entry })),
          loadCases: [
            { id: "all", name: "All", factors: {} },
            {
              id: "part",
              name: "Part",
              factors: Object.fromEntries(circuits.map((_, i) => [`c${i}`, factor])),
            },
          ],
          sensors: [{ id: "s", name: "s", ...probe, limits }],
        });
        if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
        let result;
        try {
          result = screen(parsed.document);
        } catch (error) {
          if (!(error instanceof RefusedDocumentError)) throw error;
          expect(error.faults.every(({ path }) => /^circuits\[\d\]\.path$/.test(path))).toBe(true);
          return;
        }
        const findings =
          screeningResultSchema.parse(JSON.parse(JSON.stringify(result))).sensors[0]?.findings ?? [];
        expect(findings).toHaveLength(limits.length);
        for (const { kind, value, contributions } of findings) {
          // A range has no parts; a value that is rounding alone has none to rely on.
          if (kind === "range" || (value > 0 && value < 1e-15)) continue;
          const sum = contributions.reduce((total, { part }) => total + part, 0);
          expect(
            Math.abs(sum - (value > 0 ? 1 : 0)),
            `${kind} of ${value}: ${JSON.stringify(contributions)}`,
          ).toBeLessThan(1e-6);
        }
      }),
      { numRuns: 40 },
    );
  }, 120_000);
});
