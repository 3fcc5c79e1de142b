/**
 * Stranded copper fills 93 % of its circle: gives 6.9, 9.8 and 11.4 mm for 35, 70 and 95 mm² as IEC 60228 class 2
 * does, and 8.3 for its 8.0 at 50 mm².
 */
const strandFill = 0.93;

/** Radius of one conductor in metres for a cross-section in mm². */
export const conductorRadiusM = (sizeMm2: number): number =>
  Math.sqrt(sizeMm2 / (Math.PI * strandFill)) / 1000;

/** Thickness of XLPE insulation at 0.6/1 kV in mm up to a cross-section in mm² (IEC 60502-1 table 6, from memory). */
const insulationMm: readonly (readonly [sizeMm2: number, thicknessMm: number])[] = [
  [16, 0.7],
  [35, 0.9],
  [50, 1],
  [95, 1.1],
  [120, 1.2],
  [150, 1.4],
  [185, 1.6],
  [240, 1.7],
  [300, 1.8],
  [500, 2.2],
  [800, 2.6],
];

/** Axis-to-axis distance in metres of two cores that touch. */
export function touchingSpacingM(sizeMm2: number): number {
  const thicknessMm = insulationMm.find(([upTo]) => sizeMm2 <= upTo)?.[1] ?? 2.8;
  return 2 * conductorRadiusM(sizeMm2) + (2 * thicknessMm) / 1000;
}
