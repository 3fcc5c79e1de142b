import type { Verdict } from "./screening-result";

/** Long words for a verdict; each stands only for the sources that were drawn. */
export const verdictSentence: Record<Verdict, string> = {
  within: "within its budget",
  undecided: "undecided at this certainty",
  over: "over its budget",
};

const counts = new Intl.NumberFormat("en-GB");

/** Says how much a verdict rests on: "from the 7 sources drawn". */
export function fromSourcesDrawn(sourceCount: number): string {
  if (sourceCount === 0) return "with no source drawn";
  return sourceCount === 1
    ? "from the one source drawn"
    : `from the ${counts.format(sourceCount)} sources drawn`;
}

export const counted = (count: number, one: string, many: string): string =>
  count === 1 ? `1 ${one}` : `${counts.format(count)} ${many}`;
