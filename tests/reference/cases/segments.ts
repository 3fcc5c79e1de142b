import { MU_0 } from "~/domain/units";
import { along, scale, type Vector } from "~/field/vector";
import { FAR_M, fieldOf } from "../engine";
import type { ReferenceCase } from "../reference-case";

/** H in nA/m of a current element (moment in µA·m) at a place, as a short segment. */
function elementField(momentUAm: Vector, at: Vector, point: Vector): number[] {
  const lengthM = 1e-3;
  const size = Math.hypot(...momentUAm);
  const direction = scale(momentUAm, 1 / size);
  const points = [along(at, direction, -lengthM / 2), along(at, direction, lengthM / 2)];
  return fieldOf([{ points, currentA: (size * 1e-6) / lengthM }], point).map(
    (fieldT) => (fieldT / MU_0) * 1e9,
  );
}

const loop = (widthM: number, heightM: number, currentA: number) => {
  const [x, y] = [widthM / 2, heightM / 2];
  const points: Vector[] = [
    [-x, -y, 0],
    [x, -y, 0],
    [x, y, 0],
    [-x, y, 0],
    [-x, -y, 0],
  ];
  return fieldOf([{ points, currentA }], [0, 0, 0]);
};

export const SEGMENTS: ReferenceCase[] = [
  {
    id: "FS1",
    source: "OpenStax University Physics vol. 2, module m58460, example 12.1",
    from: "opened",
    geometry: "10 mm of wire along y at the origin, 2.0 A, point 1 m away on x",
    unit: "T",
    expected: [2e-9],
    tolerance: 5e-11,
    compute: () => [
      Math.hypot(
        ...fieldOf(
          [
            {
              points: [
                [0, 0, 0],
                [0, 0.01, 0],
              ],
              currentA: 2,
            },
          ],
          [1, 0, 0],
        ),
      ),
    ],
  },
  {
    id: "FS2",
    source: "Hayt and Buck, Engineering Electromagnetics, 8th ed., example 7.1",
    from: "opened",
    geometry: "8 A in from +∞ along x to the origin, out along +y; point (0.4, 0.3, 0) m: Hz",
    unit: "A/m",
    expected: [-6.37],
    tolerance: 0.005,
    compute: () => {
      const points: Vector[] = [
        [FAR_M, 0, 0],
        [0, 0, 0],
        [0, FAR_M, 0],
      ];
      return [fieldOf([{ points, currentA: 8 }], [0.4, 0.3, 0])[2] / MU_0];
    },
  },
  {
    id: "FS3",
    source: "Hayt and Buck, Engineering Electromagnetics, 8th ed., drill D7.1(a)",
    from: "opened",
    geometry: "current element 2π µA·m along z at (0, 0, 2), point (4, 2, 0): H",
    unit: "nA/m",
    expected: [-8.51, 17.01, 0],
    tolerance: 0.005,
    compute: () => elementField([0, 0, 2 * Math.PI], [0, 0, 2], [4, 2, 0]),
  },
  {
    id: "FS5",
    source: "Hayt and Buck, Engineering Electromagnetics, 8th ed., drill D7.1(c)",
    from: "opened",
    geometry: "current element 2π(−1, 1, 2) µA·m at (1, 2, 3), point (−3, −1, 2): H",
    unit: "nA/m",
    expected: [18.9, -33.9, 26.4],
    tolerance: 0.06,
    compute: () => elementField(scale([-1, 1, 2], 2 * Math.PI), [1, 2, 3], [-3, -1, 2]),
  },
  {
    id: "LP6",
    source: "OpenStax University Physics vol. 2, module m58460, square loop: 2√2 μ₀I/πa",
    from: "opened",
    geometry: "square loop of side 0.20 m, 10 A, centre",
    unit: "T",
    expected: [5.66e-5],
    tolerance: 5e-8,
    compute: () => [loop(0.2, 0.2, 10)[2]],
  },
  {
    id: "LP7",
    source: "Halliday et al., rectangular loop: 2μ₀i√(L² + W²)/πLW",
    from: "opened (formula)",
    geometry: "loop 0.30 m × 0.10 m, 1 A, centre",
    unit: "T",
    expected: [8.432740427115677e-6],
    // The tabled figure takes μ₀ as 4π·10⁻⁷, 1.3 parts in 10¹⁰ more than the constant in force.
    tolerance: 2e-15,
    compute: () => [loop(0.3, 0.1, 1)[2]],
  },
];
