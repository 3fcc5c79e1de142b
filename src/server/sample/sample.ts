import { type PlanDocument, planDocumentSchema } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import { screen } from "~/screening/screen";
import { samplePlan } from "./sample-plan";

export interface Sample {
  document: PlanDocument;
  result: ScreeningResult;
}

let screened: Sample | undefined;

/** The front page's sample with what the engine says of it, screened on first use in each process. */
export function sample(): Sample {
  if (screened === undefined) {
    const document = planDocumentSchema.parse(samplePlan);
    screened = { document, result: screen(document) };
  }
  return screened;
}
