import { MU_0 } from "~/domain/units";
import { FAR_M, STATIC, valueOf } from "../engine";
import type { ReferenceCase } from "../reference-case";

const coil = (turns: number, radiusM: number, lengthM: number, currentA: number, atM = 0) => ({
  id: `coil-${atM}`,
  name: "Coil",
  kind: "coil" as const,
  turns,
  radiusM,
  lengthM,
  centre: [0, 0, atM] as [number, number, number],
  axis: [0, 0, 1] as [number, number, number],
  supply: { kind: "dc" as const, currentA },
});

/** Field (T) on the axis of a current sheet of `turns` ampere-turns and length L, at z from its middle. */
function sheetT(turns: number, radiusM: number, lengthM: number, zM: number): number {
  const cosine = (overM: number) => overM / Math.hypot(radiusM, overM);
  return ((MU_0 * turns) / (2 * lengthM)) * (cosine(zM + lengthM / 2) - cosine(zM - lengthM / 2));
}

/** Largest relative difference between the engine's coil and the closed form, along the axis and past its ends. */
function worstError(turns: number): number {
  const [radiusM, lengthM] = [0.3, 0.5];
  const errors = [0, 0.1, 0.25, 0.4, 1, 3].map((zM) => {
    const found = valueOf([], [0, 0, zM], [STATIC], {
      equipment: [coil(turns, radiusM, lengthM, 1 / turns)],
    });
    return Math.abs(found / sheetT(1, radiusM, lengthM, zM) - 1);
  });
  return Math.max(...errors);
}

export const SOLENOIDS: ReferenceCase[] = [
  {
    id: "SO2",
    source: "finite solenoid on its axis, μ₀nI(cos θ₁ − cos θ₂)/2 (standard textbook form)",
    from: "memory",
    geometry:
      "2 000 turns over 0.50 m, radius 0.30 m: worst relative error from the middle to 3 m along the axis",
    unit: "–",
    expected: [0],
    // Turns stand apart where the form has a sheet: (L/N)²/a² over some tens.
    tolerance: 1e-7,
    compute: () => [worstError(2000)],
  },
  {
    id: "HH1",
    source: "rule for a Helmholtz pair, 8.9918·10⁻⁷ N I/R (mailing list on coils, 25 Feb 2008)",
    from: "opened",
    geometry: "two coils of one turn and 1 m radius, 1 m apart, 1 A, middle",
    unit: "T",
    expected: [8.9918e-7],
    tolerance: 5e-12,
    compute: () => [
      valueOf([], [0, 0, 0], [STATIC], {
        equipment: [coil(1, 1, 0.001, 1, -0.5), coil(1, 1, 0.001, 1, 0.5)],
      }),
    ],
  },
  {
    id: "SO4",
    source: "Halliday et al., problem on a wire along a solenoid's axis (worked solution, ch29-p053)",
    from: "opened; radius from memory",
    geometry:
      "10 turns a centimetre, 20 mA, radius 70 mm (here 4 m long); 6.00 A along the axis; 47.7 mm out",
    unit: "T",
    expected: [3.55e-5],
    tolerance: 5e-8,
    compute: () => [
      valueOf(
        [
          {
            path: [
              [0, 0, -FAR_M],
              [0, 0, FAR_M],
            ],
            arrangement: { kind: "single" },
            supply: { kind: "dc", currentA: 6 },
          },
        ],
        [0.0477, 0, 0],
        [STATIC],
        { equipment: [coil(4000, 0.07, 4, 0.02)] },
      ),
    ],
  },
];
