import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import { screen } from "~/screening/screen";
import { type SampleChoice, samplePlan } from "./sample-plan";

export interface Sample {
  choice: SampleChoice;
  document: PlanDocument;
  result: ScreeningResult;
}

/** What may be chosen; anything else falls back to the first reading of the page. */
export const sampleCurrentsA = [40, 80, 120] as const;
export const sampleSpacingsM = [0.03, 0.15, 0.4] as const;

const firstChoice: SampleChoice = { currentA: 120, spacingM: 0.4 };

const screened = new Map<string, Sample>();

const chosen = <T extends number>(text: string | null, allowed: readonly T[]): T | undefined =>
  allowed.find((value) => String(value) === text);

/** The front page's sample for a query such as `currentA=80&spacingM=0.15`, screened once for each choice. */
export function sampleFor(query: URLSearchParams): Sample {
  const choice = {
    currentA: chosen(query.get("currentA"), sampleCurrentsA) ?? firstChoice.currentA,
    spacingM: chosen(query.get("spacingM"), sampleSpacingsM) ?? firstChoice.spacingM,
  };
  const key = JSON.stringify(choice);
  const known = screened.get(key);
  if (known !== undefined) return known;
  const document = samplePlan(choice);
  const sample = { choice, document, result: screen(document) };
  screened.set(key, sample);
  return sample;
}
