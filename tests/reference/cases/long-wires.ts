import { MU_0 } from "~/domain/units";
import type { Vector } from "~/field/vector";
import { FAR_M, fieldOf, STATIC, valueOf } from "../engine";
import type { ReferenceCase } from "../reference-case";

/** Field (T) of a long wire through the whole engine. */
const wireT = (currentA: number, distanceM: number): number =>
  valueOf(
    [
      {
        path: [
          [-FAR_M, 0, 0],
          [FAR_M, 0, 0],
        ],
        arrangement: { kind: "single" },
        supply: { kind: "dc", currentA },
        conductorRadiusM: 1e-6,
      },
    ],
    [0, distanceM, 0],
    [STATIC],
  );

const compassTrace = (currentMA: number, distanceM: number): ReferenceCase => ({
  id: `LW8-${currentMA}mA`,
  source: "Electronic-compass hardware application note AN-MPU-x000A-01 rev 1.1, table 4.1",
  from: "opened",
  geometry: `long trace, ${currentMA} mA at ${distanceM * 1000} mm: the 2 µT limit`,
  unit: "T",
  expected: [2e-6],
  tolerance: 1e-9,
  compute: () => [wireT(currentMA / 1000, distanceM)],
});

const vertical = (currentA: number): { points: Vector[]; currentA: number }[] => [
  {
    points: [
      [0, 0, -FAR_M],
      [0, 0, FAR_M],
    ],
    currentA,
  },
];

export const LONG_WIRES: ReferenceCase[] = [
  {
    id: "LW1",
    source: "OpenStax College Physics, module m42382, current for twice the Earth's field",
    from: "opened",
    geometry: "long wire, 25 A, 50 mm",
    unit: "T",
    expected: [1e-4],
    tolerance: 5e-6,
    compute: () => [wireT(25, 0.05)],
  },
  {
    id: "LW2",
    source: "OpenStax University Physics vol. 2, module m58461",
    from: "opened",
    geometry: "long wire, 20 A, 0.50 m",
    unit: "T",
    expected: [8e-6],
    tolerance: 5e-8,
    compute: () => [wireT(20, 0.5)],
  },
  {
    id: "LW5",
    source: "Hayt and Buck, Engineering Electromagnetics, 8th ed., drill D7.2(a)",
    from: "opened",
    geometry: "filament along z, 15 A, point (√20, 0, 4) m: H",
    unit: "A/m",
    expected: [0, 0.534, 0],
    tolerance: 5e-4,
    compute: () => fieldOf(vertical(15), [Math.sqrt(20), 0, 4]).map((fieldT) => fieldT / MU_0),
  },
  compassTrace(2, 0.0002),
  compassTrace(50, 0.005),
  compassTrace(200, 0.02),
  {
    id: "LW10",
    source: "common practice for net currents, no source: B in mG = 2 I/r",
    from: "opened",
    geometry: "5 A net current, 1 m",
    unit: "mG",
    expected: [10],
    // The rule takes μ₀ as 4π·10⁻⁷ exactly; the constant in force differs in the tenth digit.
    tolerance: 1e-6,
    compute: () => [wireT(5, 1) * 1e7],
  },
  {
    id: "IN1",
    source: "OpenStax University Physics vol. 2, module m58465, field inside a thick wire",
    from: "opened (formula)",
    geometry: "solid conductor of radius 30 mm, 50 A, at 15 mm from its axis",
    unit: "T",
    expected: [1.6667e-4],
    tolerance: 2e-8,
    compute: () => [
      Math.hypot(
        ...fieldOf(
          [
            {
              points: [
                [0, 0, -FAR_M],
                [0, 0, FAR_M],
              ],
              currentA: 50,
              radiusM: 0.03,
            },
          ],
          [0.015, 0, 0],
        ),
      ),
    ],
  },
  {
    id: "SP1",
    source: "OpenStax University Physics vol. 2, module m58461, three wires",
    from: "opened",
    geometry: "three parallel wires of 2 A on corners of a 10 mm square, field at the fourth",
    unit: "T",
    expected: [8e-5],
    tolerance: 5e-6,
    compute: () => [
      Math.hypot(
        ...fieldOf(
          (
            [
              [0.01, 0],
              [0, 0.01],
              [0.01, 0.01],
            ] as const
          ).map(([x, y]) => ({
            points: [
              [x, y, -FAR_M],
              [x, y, FAR_M],
            ],
            currentA: 2,
          })),
          [0, 0, 0],
        ),
      ),
    ],
  },
  {
    id: "SP2",
    source: "OpenStax University Physics vol. 2, module m58461",
    from: "opened",
    geometry: "wire of 20 A at 0.20 m with a uniform 40 µT across its field",
    unit: "T",
    expected: [4.5e-5],
    tolerance: 5e-7,
    compute: () => [Math.hypot(wireT(20, 0.2), 4e-5)],
  },
  {
    id: "SP6",
    source: "OpenStax University Physics vol. 2, module m58461: 3μ₀I/8πa",
    from: "opened (formula)",
    geometry: "two parallel wires of 1 A, 2 m apart, point 2 m outside the nearer in their plane",
    unit: "T",
    expected: [1.5e-7],
    // The printed figure takes μ₀ as 4π·10⁻⁷.
    tolerance: 1e-13,
    compute: () => [wireT(1, 2) + wireT(1, 4)],
  },
  {
    id: "SP8",
    source: "OpenStax College Physics, module m42386, appliance cord",
    from: "opened",
    geometry: "5.00 A rms, conductors 3.00 mm apart: mean and peak force per metre",
    unit: "N/m",
    expected: [0.00167, 0.00333],
    tolerance: 5e-6,
    compute: () => [5 * wireT(5, 0.003), 2 * 5 * wireT(5, 0.003)],
  },
];
