/** Shown with every result and every notice. */
export const cautions = [
  "Readings taken on site outrank this result.",
  "It is no assessment of human exposure or of implanted medical devices.",
  "Work near live conductors is for qualified people under local rules.",
  "Local codes, makers’ instructions and a licensed engineer decide.",
] as const;

/** What a result says is left out, but for what the cautions beside it say already. */
export function leftOutBesideCautions(leftOut: readonly string[]): string[] {
  const said: readonly string[] = cautions;
  return leftOut.filter((line) => !said.includes(line));
}
