import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import {
  emptyPlanDocument,
  type PlanDocument,
  type PlanDocumentInput,
} from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import { RefusedDocumentError } from "~/screening/refusal";
import { screen } from "~/screening/screen";
import { oracleField } from "../oracles/biot-savart";
import { oracleConductors, type Point } from "../oracles/conductors";

type CircuitInput = PlanDocumentInput["circuits"][number];

const coordinate = fc.integer({ min: -800, max: 800 }).map((centimetres) => centimetres / 100);
const point = fc.tuple(coordinate, coordinate, coordinate);
const spacingM = fc.double({ min: 0.02, max: 0.2, noNaN: true });
const rollDeg = fc.double({ min: -180, max: 180, noNaN: true });
const currentA = fc.double({ min: 1, max: 500, noNaN: true });
const phaseDeg = fc.double({ min: -180, max: 180, noNaN: true });

const loaded = fc.oneof(
  fc.record({
    arrangement: fc.oneof(
      fc.record({ kind: fc.constant("single" as const) }),
      fc.record({ kind: fc.constant("pair" as const), spacingM, rollDeg }),
    ),
    supply: fc.oneof(
      fc.record({ kind: fc.constant("dc" as const), currentA }),
      fc.record({ kind: fc.constant("ac1" as const), currentA, frequencyHz: fc.constant(50), phaseDeg }),
    ),
  }),
  fc.record({
    arrangement: fc.record({
      kind: fc.constantFrom("flat" as const, "trefoil" as const, "quad" as const),
      spacingM,
      rollDeg,
    }),
    supply: fc.record({
      kind: fc.constant("ac3" as const),
      currentA,
      frequencyHz: fc.constant(50),
      phaseDeg,
      sequence: fc.constantFrom("abc" as const, "acb" as const),
    }),
  }),
);

const circuits = fc.array(
  fc.tuple(
    fc.array(point, { minLength: 2, maxLength: 5 }),
    loaded,
    fc.double({ min: 0, max: 20, noNaN: true }),
  ),
  { minLength: 1, maxLength: 4 },
);

function planOf(
  entries: [Point[], Pick<CircuitInput, "arrangement" | "supply">, number][],
  position: Point,
): PlanDocument {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Random plan"),
    circuits: entries.map(([path, rest, stray], i) => ({
      id: `c${i}`,
      name: `c${i}`,
      source: "mains",
      path,
      ...rest,
      conductorRadiusM: 0.001,
      strayCurrentA: ["pair", "quad"].includes(rest.arrangement.kind)
        ? stray
        : rest.arrangement.kind === "single"
          ? null
          : 0,
      strayAngleDeg: rest.supply?.kind === "dc" || rest.arrangement.kind === "single" ? 0 : 37,
      currentTolerancePercent: 0,
    })),
    sensors: [
      {
        id: "s",
        name: "s",
        position,
        limits: [
          { kind: "static", limitT: 1 },
          { kind: "alternating", limitT: 1, bandHz: [50, 50] },
          { kind: "alternating", limitT: 1, bandHz: [50, 50], measure: "peakToPeak" },
        ],
      },
    ],
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

/** Screens unless a random path is one that is refused; sharp bends are bevelled, which the oracle does not know. */
function screened(document: PlanDocument): ScreeningResult {
  try {
    const result = screen(document);
    fc.pre(!result.checks.warnings.some((warning) => /bevelled|inside a conductor/.test(warning)));
    return result;
  } catch (error) {
    if (!(error instanceof RefusedDocumentError)) throw error;
    throw new fc.PreconditionFailure();
  }
}

describe("the engine against the slow and obvious way", () => {
  it("gives the steady field, the rms resultant and the peak of random plans", () => {
    fc.assert(
      fc.property(circuits, point, (entries, position) => {
        const document = planOf(entries, position);
        const result = screened(document);
        const conductors = document.circuits.flatMap(oracleConductors);
        const oracle = oracleField(conductors, position, 0.02);
        const [steady, rms, peakToPeak] = (result.sensors[0]?.findings ?? []).map(({ value }) => value);
        const scale = Math.hypot(...oracle.steady) + oracle.rms;
        expect(Math.abs((steady ?? NaN) - Math.hypot(...oracle.steady))).toBeLessThan(1e-6 * scale + 1e-15);
        expect(Math.abs((rms ?? NaN) - oracle.rms)).toBeLessThan(1e-6 * scale + 1e-15);
        // The oracle looks at 720 instants, so that it may miss the peak by a few parts in 10⁵.
        expect(Math.abs((peakToPeak ?? NaN) - 2 * oracle.peak)).toBeLessThan(1e-4 * scale + 1e-15);
        expect(result.checks.circulationError ?? 0).toBeLessThan(1e-7);
      }),
      { numRuns: 300 },
    );
  }, 60_000);

  it("turns the field with the plan and adds up over circuits", () => {
    fc.assert(
      fc.property(
        circuits,
        point,
        fc.double({ min: -3, max: 3, noNaN: true }),
        (entries, position, angle) => {
          const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
          const turn = ([x, y, z]: Point): Point => [x * cos - y * sin, x * sin + y * cos, z];
          const level = entries.filter(([path]) => !startsUpright(path));
          fc.pre(level.length > 0);
          const fieldOf = (list: typeof entries, at: Point): Point =>
            screened(planOf(list, at)).sensors[0]?.findings[0]?.field.static ?? [0, 0, 0];
          const before = fieldOf(level, position);
          const turned = fieldOf(
            level.map(([path, ...rest]) => [path.map(turn), ...rest]),
            turn(position),
          );
          const size = Math.hypot(...before) + 1e-12;
          turn(before).forEach((component, i) =>
            expect(Math.abs(component - (turned[i] ?? NaN))).toBeLessThan(1e-7 * size),
          );
          const parts = level.map((entry) => fieldOf([entry], position));
          const sizes = parts.reduce((sum, part) => sum + Math.hypot(...part), 1e-18);
          before.forEach((component, i) => {
            const sum = parts.reduce((total, part) => total + part[i as 0 | 1 | 2], 0);
            expect(Math.abs(component - sum)).toBeLessThan(1e-12 * sizes);
          });
        },
      ),
      { numRuns: 150 },
    );
  }, 60_000);
});

/** On such a leg u is the plan's own +x, which does not turn with it. */
function startsUpright([from, to]: Point[]): boolean {
  if (!from || !to) return true;
  return Math.hypot(to[0] - from[0], to[1] - from[1]) < 0.05 * Math.abs(to[2] - from[2]);
}
