import { describe, expect, it } from "vitest";
import { MU_0 } from "~/domain/units";
import type { Finding } from "~/domain/screening-result";
import type { Vector } from "~/field/vector";
import { ALTERNATING, FAR_M, findingsOf, STATIC, valueOf } from "./engine";

type Circuit = Parameters<typeof findingsOf>[0][number];
type Path = [number, number, number][];

const DEGREE = Math.PI / 180;

const fieldAt = (circuit: Circuit, at: Vector): Vector => {
  const [finding] = findingsOf([circuit], at, [STATIC]);
  if (!finding) throw new Error("no finding");
  return finding.field.static;
};

describe("a path that starts upright, when the plan is turned", () => {
  const angleDeg = 37;
  const [cos, sin] = [Math.cos(angleDeg * DEGREE), Math.sin(angleDeg * DEGREE)];
  const turn = ([x, y, z]: readonly [number, number, number]): [number, number, number] => [
    x * cos - y * sin,
    x * sin + y * cos,
    z,
  ];
  const at: [number, number, number] = [0.7, -0.4, 1.2];
  const pair = (path: Path, rollDeg: number): Circuit => ({
    path,
    arrangement: { kind: "pair", spacingM: 0.1, rollDeg },
    supply: { kind: "dc", currentA: 100 },
  });
  const difference = (path: Path, rollDeg: number): number => {
    const before = turn(fieldAt(pair(path, 20), at));
    const after = fieldAt(pair(path.map(turn), rollDeg), turn(at));
    return Math.hypot(...before.map((part, i) => part - (after[i] ?? NaN))) / Math.hypot(...before);
  };

  // There u stays the plan's +x, so that the section must be turned along: v = u × t is −y on the way up and +y on the way
  // down, and the roll turns u towards v.
  it.each([
    ["up", 3, -1],
    ["down", -3, 1],
  ] as const)("turns the field too if the section's roll is turned along, %s", (_name, heightM, sense) => {
    const path: Path = [
      [0, 0, 0],
      [0, 0, heightM],
      [2, 1, heightM],
    ];
    expect(difference(path, 20 + sense * angleDeg)).toBeLessThan(1e-12);
    expect(difference(path, 20)).toBeGreaterThan(1e-2);
  });

  it("turns the field with the same roll where the first leg leans by more than a degree", () => {
    const leaning: Path = [
      [0, 0, 0],
      [3 * Math.tan(1.01 * DEGREE), 0, 3],
      [2, 1, 3],
    ];
    expect(difference(leaning, 20)).toBeLessThan(1e-12);
  });
});

describe("contributions to a peak-to-peak value", () => {
  const long: Path = [
    [0, -FAR_M, 0],
    [0, FAR_M, 0],
  ];
  const wire = (currentA: number, frequencyHz: number, source: string, phaseDeg = 0): Circuit => ({
    path: long,
    arrangement: { kind: "single" },
    supply: { kind: "ac1", currentA, frequencyHz, phaseDeg },
    source,
  });
  const PEAK = { ...ALTERNATING, measure: "peakToPeak" as const };
  const found = (circuits: Circuit[]): Finding => {
    const [finding] = findingsOf(circuits, [1, 0, 0], [PEAK]);
    if (!finding) throw new Error("no finding");
    return finding;
  };
  const perAmpereT = MU_0 / (2 * Math.PI);
  const partsOf = (finding: Finding) => finding.contributions.map(({ part }) => part);

  it("adds the peaks of frequencies, and weighs their parts by the squares as for an rms value", () => {
    const finding = found([wire(3, 50, "a"), wire(1, 150, "b")]);
    expect(finding.value / (2 * Math.SQRT2 * 4 * perAmpereT)).toBeCloseTo(1, 9);
    const [first, second] = partsOf(finding);
    expect(first).toBeCloseTo(0.9, 9);
    expect(second).toBeCloseTo(0.1, 9);
  });

  it("splits within a source by the phasors and shows what relieves as negative", () => {
    const finding = found([wire(5, 50, "a"), wire(2, 50, "a", 180), wire(1, 50, "b", 90)]);
    expect(finding.value / (2 * Math.SQRT2 * 4 * perAmpereT)).toBeCloseTo(1, 9);
    const expected = [5 / 4, -2 / 4, 1 / 4];
    partsOf(finding).forEach((part, i) => expect(part).toBeCloseTo(expected[i] ?? NaN, 9));
  });
});

describe("edges", () => {
  const long: Path = [
    [0, -FAR_M, 0],
    [0, FAR_M, 0],
  ];
  const single = (supply: Circuit["supply"]): Circuit => ({
    path: long,
    arrangement: { kind: "single" },
    supply,
    conductorRadiusM: 1e-3,
  });
  const perAmpereT = MU_0 / (2 * Math.PI);

  it("counts a frequency on either edge of a band, and none a hair outside it", () => {
    const circuit = single({
      kind: "ac1",
      currentA: 10,
      frequencyHz: 16.7,
      harmonics: [{ order: 3, percent: 50 }],
    });
    const inBand = (lowHz: number, highHz: number) =>
      valueOf([circuit], [1, 0, 0], [{ kind: "alternating", limitT: 1, bandHz: [lowHz, highHz] }]) /
      perAmpereT;
    expect(inBand(16.7, 20)).toBeCloseTo(10, 6);
    expect(inBand(1, 16.7)).toBeCloseTo(10, 6);
    // As a person writes it: three times 16.7 in binary is not 50.1.
    expect(inBand(50.1, 60)).toBeCloseTo(5, 6);
    expect(inBand(20, 50.1)).toBeCloseTo(5, 6);
    expect(inBand(16.7 * (1 + 1e-6), 50.1 * (1 - 1e-6))).toBe(0);
  });

  it("reports the ellipse of what the band takes, where one source has frequencies on both sides of its edge", () => {
    const circuits = [49.9, 50.1].map((frequencyHz) => ({
      ...single({ kind: "ac1", currentA: 10, frequencyHz }),
      source: "mains",
    }));
    const limit = { kind: "alternating" as const, limitT: 1, bandHz: [50, 60] as [number, number] };
    for (const order of [circuits, circuits.toReversed()]) {
      const [finding] = findingsOf(order, [1, 0, 0], [limit]);
      expect((finding?.value ?? NaN) / (10 * perAmpereT)).toBeCloseTo(1, 8);
      expect(finding?.ellipse?.rmsT).toBe(finding?.value);
    }
  });

  it("is within exactly at the limit", () => {
    const circuit = single({ kind: "dc", currentA: 10 });
    const limitT = valueOf([circuit], [1, 0, 0], [STATIC]);
    const verdictOf = (at: number) =>
      findingsOf([circuit], [1, 0, 0], [{ kind: "static", limitT: at }])[0]?.verdict;
    expect(verdictOf(limitT)).toBe("within");
    expect(verdictOf(limitT * (1 - 1e-12))).toBe("over");
  });

  it("takes the surface of a conductor from both sides, and its axis as field-free", () => {
    const circuit = single({ kind: "dc", currentA: 10 });
    const at = (xM: number) => valueOf([circuit], [xM, 0, 0], [STATIC]);
    expect(at(1e-3 * (1 + 1e-9)) / ((10 * perAmpereT) / 1e-3)).toBeCloseTo(1, 8);
    expect(at(1e-3 * (1 - 1e-9)) / ((10 * perAmpereT) / 1e-3)).toBeCloseTo(1, 8);
    expect(at(0)).toBe(0);
  });

  it("subtracts a background vector that opposes, and compares its component along an axis", () => {
    const circuit = single({ kind: "dc", currentA: 10 });
    const own = fieldAt(circuit, [1, 0, 0]);
    const sensors = (staticT: [number, number, number], axis: [number, number, number] | null) =>
      findingsOf([circuit], [1, 0, 0], [STATIC], {
        sensors: [
          { id: "s", name: "s", position: [1, 0, 0], axis, background: { staticT }, limits: [STATIC] },
        ],
      })[0]?.value ?? NaN;
    expect(sensors([-own[0], -own[1], -own[2]], null)).toBeLessThan(1e-20);
    expect(sensors([3e-6, 0, 0], [1, 0, 0])).toBeCloseTo(3e-6, 15);
    expect(sensors([0, 0, -1e-6 - own[2]], [0, 0, -5])).toBeCloseTo(1e-6, 15);
  });
});
