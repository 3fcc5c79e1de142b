/** A published figure and how the engine meets it. */
export interface ReferenceCase {
  id: string;
  source: string;
  /** How the source was had: opened and read, from memory, or derived. */
  from: string;
  geometry: string;
  unit: string;
  expected: number[];
  /** Published rounding, one for all figures or one each. */
  tolerance: number | number[];
  compute: () => number[];
}

export function toleranceOf({ tolerance }: ReferenceCase, index: number): number {
  return typeof tolerance === "number" ? tolerance : (tolerance[index] ?? 0);
}
