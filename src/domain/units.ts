/** Conversions and constants. Everything inside is SI; other units exist only where a person reads or types. */

/** Magnetic constant, N/A². CODATA 2022. */
export const MU_0 = 1.25663706127e-6;

export const NANOTESLA_PER_TESLA = 1e9;
export const MICROTESLA_PER_TESLA = 1e6;
export const MILLIGAUSS_PER_TESLA = 1e7;

export const radians = (angleDeg: number): number => (angleDeg * Math.PI) / 180;
export const degrees = (angleRad: number): number => (angleRad * 180) / Math.PI;

export const nanotesla = (fieldT: number): number => fieldT * NANOTESLA_PER_TESLA;
export const microtesla = (fieldT: number): number => fieldT * MICROTESLA_PER_TESLA;
export const milligauss = (fieldT: number): number => fieldT * MILLIGAUSS_PER_TESLA;
export const teslaFromNanotesla = (fieldNT: number): number => fieldNT / NANOTESLA_PER_TESLA;
export const teslaFromMicrotesla = (fieldUT: number): number => fieldUT / MICROTESLA_PER_TESLA;

export const metresFromMillimetres = (lengthMm: number): number => lengthMm / 1000;
export const millimetres = (lengthM: number): number => lengthM * 1000;
export const kilometres = (lengthM: number): number => lengthM / 1000;

/** Magnetic field strength H of a flux density in air, A/m. */
export const amperesPerMetre = (fieldT: number): number => fieldT / MU_0;

const FIELD_STEPS: readonly (readonly [number, string])[] = [
  [1, "T"],
  [1e-3, "mT"],
  [1e-6, "µT"],
  [1e-9, "nT"],
];

/** A flux density as a person reads it: three significant figures and the largest unit that leaves 1 or more, never below nT. */
export function fieldText(fieldT: number): string {
  return `${scaled(fieldT, FIELD_STEPS)}`;
}

/** A field gradient as a person reads it, in µT/m or nT/m. */
export function gradientText(gradientTPerM: number): string {
  return `${scaled(gradientTPerM, FIELD_STEPS)}/m`;
}

/** An angle in degrees as a person reads it. */
export function angleText(angleDeg: number): string {
  return `${significant(angleDeg)}°`;
}

function scaled(value: number, steps: readonly (readonly [number, string])[]): string {
  const step = steps.find(([size]) => Math.abs(value) >= size) ?? steps[steps.length - 1];
  if (!step) return String(value);
  return `${significant(value / step[0])} ${step[1]}`;
}

function significant(value: number): string {
  if (value === 0) return "0";
  return Math.abs(value) >= 1000 ? value.toFixed(0) : String(Number(value.toPrecision(3)));
}
