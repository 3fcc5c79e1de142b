/** A number as a person reads it, in pieces that a table can align. */
export interface FormattedQuantity {
  value: string;
  /** Null where none was given or it is zero. */
  uncertainty: string | null;
  unit: string;
}

interface Scale {
  factor: number;
  unit: string;
}

/** What a finding's `unit` may say. */
export type QuantityUnit = "T" | "T/m" | "deg";

const prefixes = [
  { from: 1, factor: 1, prefix: "" },
  { from: 1e-3, factor: 1e3, prefix: "m" },
  { from: 1e-6, factor: 1e6, prefix: "µ" },
  { from: 0, factor: 1e9, prefix: "n" },
] as const;

const minus = "\u2212";

function scaleFor(magnitude: number, unit: QuantityUnit): Scale {
  if (unit === "deg") return { factor: 1, unit: "°" };
  // Rounding may lift a value to the next prefix: 999.96 nT reads 1.000 µT.
  const rounded = Number(magnitude.toPrecision(3));
  const { factor, prefix } = prefixes.find(({ from }) => rounded >= from) ?? prefixes[3];
  return { factor, unit: `${prefix}${unit}` };
}

/** Decimals that show `significant` digits of `magnitude`, at least 0 and at most 6. */
function decimalsFor(magnitude: number, significant: number): number {
  if (magnitude === 0 || !Number.isFinite(magnitude)) return 0;
  // toPrecision first: 0.0996 to two digits is 0.10, one decimal fewer than its own logarithm says.
  const exponent = Math.floor(Math.log10(Number(magnitude.toPrecision(significant))));
  return Math.min(6, Math.max(0, significant - 1 - exponent));
}

/** Fixed decimals with a true minus sign and no negative zero. */
export function formatNumber(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? minus + text : text;
}

/**
 * `value` in the prefix that suits it. With an expanded uncertainty both end at its second significant digit
 * (JCGM 100, 7.2.6); without one the value has three significant digits.
 */
export function formatQuantity(
  value: number,
  unit: QuantityUnit,
  expandedUncertainty: number | null = null,
): FormattedQuantity {
  const scale = scaleFor(Math.max(Math.abs(value), expandedUncertainty ?? 0), unit);
  const scaled = value * scale.factor;
  const scaledU = (expandedUncertainty ?? 0) * scale.factor;
  const decimals = scaledU > 0 ? decimalsFor(scaledU, 2) : decimalsFor(Math.abs(scaled), 3);
  return {
    value: formatNumber(scaled, decimals),
    uncertainty: scaledU > 0 ? formatNumber(scaledU, decimals) : null,
    unit: scale.unit,
  };
}

/** A magnetic flux density in words: "1.42 µT", "1.42 ± 0.11 µT". */
export function formatField(fieldT: number, expandedUncertaintyT: number | null = null): string {
  return quantityText(formatQuantity(fieldT, "T", expandedUncertaintyT));
}

export function quantityText({ value, uncertainty, unit }: FormattedQuantity): string {
  const space = unit === "°" ? "" : "\u00a0";
  if (uncertainty === null) return `${value}${space}${unit}`;
  const pair = `${value}\u00a0±\u00a0${uncertainty}`;
  return unit === "°" ? `(${pair})°` : `${pair}${space}${unit}`;
}

/** A limit as it was typed: no zeros at the end, at most six digits. */
export function formatLimit(limit: number, unit: QuantityUnit): string {
  const scale = scaleFor(limit, unit);
  return `${Number((limit * scale.factor).toPrecision(6)).toString()}${unit === "deg" ? "" : "\u00a0"}${scale.unit}`;
}

/** Share of a budget in per cent: "142 %", "4.2 %", "under 0.1 %". */
export function formatBudget(budgetUsed: number): string {
  const percent = budgetUsed * 100;
  if (percent > 0 && percent < 0.05) return "under\u00a00.1\u00a0%";
  return `${formatNumber(percent, Math.abs(percent) < 9.95 ? 1 : 0)}\u00a0%`;
}

/** Share of a finding's value that one source gives: always one decimal, so that a column aligns. */
export const formatShare = (part: number): string => `${formatNumber(part * 100, 1)}\u00a0%`;

export const formatLength = (lengthM: number): string => `${formatNumber(lengthM, 2)}\u00a0m`;

export const formatCurrent = (currentA: number): string =>
  `${formatNumber(currentA, Math.abs(currentA) >= 99.95 ? 0 : 1).replace(/\.0$/, "")}\u00a0A`;
