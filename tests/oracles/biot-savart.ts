import type { OracleConductor, Point } from "./conductors";

const MU_0_OVER_4_PI = 1.25663706127e-6 / (4 * Math.PI);

/** Nodes and weights of the five-point Gauss rule on [0, 1] (Abramowitz and Stegun, table 25.4). */
const GAUSS: [number, number][] = [
  [0.5, 0.2844444444444444],
  [0.5 - 0.2692346550528415, 0.2393143352496832],
  [0.5 + 0.2692346550528415, 0.2393143352496832],
  [0.5 - 0.453089922969332, 0.1184634425280946],
  [0.5 + 0.453089922969332, 0.1184634425280946],
];

/** Field (T/A) of one straight piece by integrating dl × r/r³, pieces halved until they are short beside their distance. */
function piece(from: Point, to: Point, at: Point, out: Point): void {
  const l: Point = [to[0] - from[0], to[1] - from[1], to[2] - from[2]];
  const middle: Point = [from[0] + l[0] / 2, from[1] + l[1] / 2, from[2] + l[2] / 2];
  const length = Math.hypot(...l);
  const away = Math.hypot(at[0] - middle[0], at[1] - middle[1], at[2] - middle[2]);
  if (length > 0.3 * away && length > 1e-7) {
    piece(from, middle, at, out);
    piece(middle, to, at, out);
    return;
  }
  for (const [share, weight] of GAUSS) {
    const r: Point = [
      at[0] - from[0] - share * l[0],
      at[1] - from[1] - share * l[1],
      at[2] - from[2] - share * l[2],
    ];
    const k = (weight * MU_0_OVER_4_PI) / Math.hypot(...r) ** 3;
    out[0] += k * (l[1] * r[2] - l[2] * r[1]);
    out[1] += k * (l[2] * r[0] - l[0] * r[2]);
    out[2] += k * (l[0] * r[1] - l[1] * r[0]);
  }
}

function unitField({ points }: OracleConductor, at: Point): Point {
  const out: Point = [0, 0, 0];
  points.slice(1).forEach((to, i) => {
    if (Math.hypot(...to.map((c, k) => c - (points[i]?.[k] ?? 0))) > 0)
      piece(points[i] as Point, to, at, out);
  });
  return out;
}

/** What the field does over one period at a point: steady part, rms resultant and largest instantaneous size of the alternating part. */
export function oracleField(conductors: OracleConductor[], at: Point, periodS: number) {
  const units = conductors.map((conductor) => unitField(conductor, at));
  const sum = (weightOf: (conductor: OracleConductor) => number): Point =>
    units.reduce<Point>(
      (total, field, i) => {
        const weight = weightOf(conductors[i] as OracleConductor);
        return [total[0] + weight * field[0], total[1] + weight * field[1], total[2] + weight * field[2]];
      },
      [0, 0, 0],
    );
  const steps = 720;
  let squares = 0;
  let largest = 0;
  for (let step = 0; step < steps; step++) {
    const size = Math.hypot(...sum(({ alternatingA }) => alternatingA((periodS * step) / steps)));
    squares += (size * size) / steps;
    largest = Math.max(largest, size);
  }
  return { steady: sum(({ dcA }) => dcA), rms: Math.sqrt(squares), peak: largest };
}
