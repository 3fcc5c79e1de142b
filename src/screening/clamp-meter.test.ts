import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import type { Vector } from "~/field/vector";
import { clampMeterReading } from "./clamp-meter";

function planned(
  circuits: Partial<PlanDocumentInput["circuits"][number]>[],
  rest: Partial<PlanDocumentInput> = {},
) {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Clamp"),
    circuits: circuits.map((circuit, i) => ({
      id: `c${i}`,
      name: `Circuit ${i}`,
      path: [
        [-500, 0.01 * i, 1],
        [500, 0.01 * i, 1],
      ] as [number, number, number][],
      arrangement: { kind: "single" },
      conductorRadiusM: 0.001,
      supply: { kind: "dc", currentA: 10 },
      ...circuit,
    })),
    ...rest,
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

/** Across a tray along x, right-handed about +x. */
const across: Vector[] = [
  [0.1, -0.5, 0.7],
  [0.1, 0.6, 0.7],
  [0.1, 0.6, 1.4],
  [0.1, -0.5, 1.4],
];

describe("clampMeterReading", () => {
  it("reads the net DC and the net rms per frequency through a tray", () => {
    const document = planned([
      {},
      { supply: { kind: "dc", currentA: -4 } },
      {
        arrangement: { kind: "quad", spacingM: 0.03 },
        supply: { kind: "ac3", currentA: 100, frequencyHz: 50, harmonics: [{ order: 3, percent: 20 }] },
        strayCurrentA: 7,
      },
    ]);
    const reading = clampMeterReading(document, across);
    // The tray ends 500 m away, where its open ends see the loop under a small solid angle.
    expect(reading.dcA).toBeCloseTo(6, 4);
    expect(reading.alternating.map(({ frequencyHz }) => frequencyHz)).toEqual([50, 150]);
    expect(reading.alternating[0]?.rmsA).toBeCloseTo(7, 4);
    expect(reading.alternating[1]?.rmsA).toBeCloseTo(0, 9);
    expect(clampMeterReading(document, [...across].reverse()).dcA).toBeCloseTo(-6, 4);
  });

  it("counts the turns of a coil that pass through and follows load cases", () => {
    const coil = {
      id: "e1",
      name: "Reel",
      kind: "coil" as const,
      turns: 12,
      radiusM: 0.4,
      lengthM: 0.1,
      centre: [0, 0.3, 1] as [number, number, number],
      axis: [0, 0, 1] as [number, number, number],
      supply: { kind: "dc" as const, currentA: 20 },
    };
    const loadCases = [{ id: "half", name: "Half", factors: { e1: 0.5 } }];
    const document = planned([], { equipment: [coil], loadCases });
    const aroundOneSide: Vector[] = [
      [-0.2, 0, 0.5],
      [0.2, 0, 0.5],
      [0.2, 0, 1.5],
      [-0.2, 0, 1.5],
    ].map(([x = 0, , z = 0]): Vector => [0, x + 0.7, z]);
    expect(Math.abs(clampMeterReading(document, aroundOneSide, "half").dcA)).toBeCloseTo(120, 9);
    expect(() => clampMeterReading(document, aroundOneSide, "none")).toThrow(/no load case/);
    expect(() => clampMeterReading(document, [[0, 0, 0]])).toThrow(/three corners/);
  });
});
