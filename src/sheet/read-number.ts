/** A decimal number with point or comma; grouped thousands are accepted only where they can't be mistaken. */
export function readNumber(text: string): number | null {
  const tidy = text.replace(/[\s\u00a0\u202f']/g, "").replace(/\u2212/g, "-");
  if (/^[+-]?\d{1,3}(\.\d{3})+,\d+$/.test(tidy)) return Number(tidy.replace(/\./g, "").replace(",", "."));
  if (/^[+-]?\d{1,3}(,\d{3})+\.\d+$/.test(tidy)) return Number(tidy.replace(/,/g, ""));
  if (/^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d+)?$/i.test(tidy)) return Number(tidy.replace(",", "."));
  return null;
}

/** A number for an input: no zeros at the end, at most `digits` significant ones. */
export const numberText = (value: number, digits = 7): string => String(Number(value.toPrecision(digits)));
