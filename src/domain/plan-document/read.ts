import { parsePlanDocument, type ParsedPlanDocument } from "./parse";

/** Largest plan document read, bytes. */
export const MAX_DOCUMENT_BYTES = 20_000_000;

export type ReadPlanDocument = ParsedPlanDocument | { ok: false; faults: []; notJson: string };

/** Reads a plan document's text. Never throws; `notJson` says why a text is none at all. */
export function readPlanDocument(text: string): ReadPlanDocument {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    return { ok: false, faults: [], notJson: error instanceof Error ? error.message : String(error) };
  }
  return parsePlanDocument(json);
}
