import type { PlanEarth } from "../earth";

/**
 * The state that a limit is measured on. `groups` holds 2·width numbers per field group (real parts, then imaginary; rms
 * phasors, plan axes; width 3: field in T, 9: gradient in T/m); `bounds` one magnitude per frequency class, to be added
 * to the magnitude of the rest (T or T/m).
 */
export interface MeasuredState {
  groups: Float64Array;
  bounds: Float64Array;
  earth: PlanEarth | null;
}

/**
 * A limit's quantity with its derivatives. `slope` and `share` are linear forms on the groups (same layout): adding a small
 * δ to the state changes the value by ⟨slope, δ⟩; a source whose phasors are b contributes ⟨share, b⟩ of the value.
 * `boundSlope` and `boundShare` are the same per frequency class.
 */
export interface Measured {
  value: number;
  slope: Float64Array;
  boundSlope: Float64Array;
  share: Float64Array;
  boundShare: Float64Array;
  /** Derivatives by horizontal intensity (1/T) and declination (1/rad); 0 but for heading. */
  byHorizontalT: number;
  byDeclinationRad: number;
}

export type Measure = (state: MeasuredState) => Measured;

export function blankMeasured({ groups, bounds }: MeasuredState): Measured {
  return {
    value: 0,
    slope: new Float64Array(groups.length),
    boundSlope: new Float64Array(bounds.length),
    share: new Float64Array(groups.length),
    boundShare: new Float64Array(bounds.length),
    byHorizontalT: 0,
    byDeclinationRad: 0,
  };
}

/** Sum of the products of `count` numbers from `a[at]` and `b[bt]`. */
export function product(
  a: Float64Array,
  at: number,
  b: ArrayLike<number>,
  bt: number,
  count: number,
): number {
  let sum = 0;
  for (let i = 0; i < count; i++) sum += (a[at + i] as number) * (b[bt + i] as number);
  return sum;
}
