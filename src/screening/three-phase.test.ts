import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { MU_0 } from "~/domain/units";
import { screen } from "./screen";

type CircuitInput = PlanDocumentInput["circuits"][number];
type LimitInput = PlanDocumentInput["sensors"][number]["limits"][number];

const band = (lowHz: number, highHz: number, rest = {}): LimitInput => ({
  kind: "alternating",
  limitT: 1,
  bandHz: [lowHz, highHz],
  ...rest,
});

function values(
  circuits: Partial<CircuitInput>[],
  limits: LimitInput[],
  position: [number, number, number] = [0, 1, 0],
) {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Three phases"),
    circuits: circuits.map((circuit, i) => ({
      id: `c${i}`,
      name: `Circuit ${i}`,
      source: "mains",
      path: [
        [-5000, 0, 0],
        [5000, 0, 0],
      ] as [number, number, number][],
      arrangement: { kind: "flat", spacingM: 0.041 },
      conductorRadiusM: 0.01,
      supply: { kind: "ac3", currentA: 1600, frequencyHz: 50 },
      strayCurrentA: 0,
      ...circuit,
    })),
    sensors: [{ id: "s", name: "Probe", position, limits }],
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return screen(parsed.document).sensors[0]?.findings.map(({ value }) => value) ?? [];
}

const wire = (currentA: number, rM: number) => (MU_0 * currentA) / (2 * Math.PI * rM);

describe("three-phase circuits", () => {
  it("meets the handbook figures for four cables a phase, 1600 A, 41 mm pitch, 1 m away", () => {
    const at = (conductors: string, pitchM = 0.041) =>
      [...conductors].map((of, i) => ({
        offsetM: [(i - (conductors.length - 1) / 2) * pitchM, 0] as [number, number],
        of: of as "a" | "b" | "c",
        fraction: 0.25,
      }));
    const size = (conductors: string) =>
      (values(
        [{ arrangement: { kind: "custom", conductors: at(conductors) } }],
        [band(50, 50)],
        [0, 0, 1],
      )[0] ?? NaN) * 1e6;
    // Derived figures of the trade: 88, 21.5 and 2.6 µT.
    expect(size("aaaabbbbcccc")).toBeCloseTo(88, 0);
    expect(size("abcabcabcabc")).toBeCloseTo(21.5, 0.5);
    expect(size("abccbaabccba")).toBeCloseTo(2.6, 0.5);
  });

  it("puts phase orders of parallel sets into their slots", () => {
    const sets = (phaseOrders: ("abc" | "cba")[]) =>
      values(
        [
          {
            arrangement: { kind: "flat", spacingM: 0.041, parallel: { sets: 2, pitchM: 0.123, phaseOrders } },
          },
        ],
        [band(50, 50)],
        [0, 0, 5],
      )[0] ?? NaN;
    const custom = (order: string) =>
      values(
        [
          {
            arrangement: {
              kind: "custom",
              conductors: [...order].map((of, i) => ({
                offsetM: [(i - 2.5) * 0.041, 0] as [number, number],
                of: of as "a",
                fraction: 0.5,
              })),
            },
          },
        ],
        [band(50, 50)],
        [0, 0, 5],
      )[0] ?? NaN;
    expect(sets(["abc", "cba"]) / custom("abccba")).toBeCloseTo(1, 9);
    expect(sets(["abc", "abc"]) / custom("abcabc")).toBeCloseTo(1, 9);
    expect(sets(["abc", "abc"]) / sets(["abc", "cba"])).toBeGreaterThan(10);
  });

  it("adds triplen harmonics threefold in the neutral and sees stray current as a net current", () => {
    const arrangement = { kind: "flat-n" as const, spacingM: 0.03 };
    const supply = {
      kind: "ac3" as const,
      currentA: 100,
      frequencyHz: 50,
      harmonics: [{ order: 3, percent: 33 }],
    };
    const far: [number, number, number] = [0, 0, 400];
    const [fundamental = NaN, third = NaN] = values(
      [{ arrangement, supply, strayCurrentA: 5 }],
      [band(50, 50), band(150, 150)],
      far,
    );
    expect(fundamental / wire(5, 400)).toBeCloseTo(1, 2);
    // Moment about the neutral of three currents of 33 A in phase at −3d, −2d, −d.
    expect(third / ((wire(33, 400) * 6 * 0.03) / 400)).toBeCloseTo(1, 2);
  });

  it("turns an unbalanced load's neutral by the sum of its phases", () => {
    const phases: [
      { currentA: number; angleDeg: number },
      { currentA: number; angleDeg: number },
      { currentA: number; angleDeg: number },
    ] = [
      { currentA: 90, angleDeg: 10 },
      { currentA: 0, angleDeg: 0 },
      { currentA: 0, angleDeg: 0 },
    ];
    const arrangement = { kind: "flat-n" as const, spacingM: 0.03 };
    const [value = NaN] = values(
      [{ arrangement, supply: { kind: "ac3", frequencyHz: 50, phases } }],
      [band(50, 50)],
      [0, 0, 3],
    );
    const pair = { kind: "pair" as const, spacingM: 0.09 };
    const [same = NaN] = values(
      [{ arrangement: pair, supply: { kind: "ac1", currentA: 90, frequencyHz: 50 } }],
      [band(50, 50)],
      [0, 0, 3],
    );
    expect(value / same).toBeCloseTo(1, 9);
  });

  it("swaps b and c by the sequence and reports peak to peak of the ellipse", () => {
    const of = (sequence: "abc" | "acb", orders: "abc" | "acb") =>
      values(
        [
          {
            arrangement: {
              kind: "flat",
              spacingM: 0.05,
              parallel: { sets: 1, pitchM: 1, phaseOrders: [orders] },
            },
            supply: { kind: "ac3", currentA: 100, frequencyHz: 50, sequence },
          },
        ],
        [band(50, 50), band(50, 50, { measure: "peakToPeak" })],
        [0, 0.08, 0.02],
      );
    const [rms = NaN, peakToPeak = NaN] = of("abc", "abc");
    expect(of("acb", "acb")[0]).toBeCloseTo(rms, 14);
    expect(Math.abs((of("acb", "abc")[0] ?? 0) / rms - 1)).toBeLessThan(1e-9);
    expect(peakToPeak).toBeGreaterThan(2 * rms);
    expect(peakToPeak).toBeLessThanOrEqual(2 * Math.SQRT2 * rms);
  });
});
