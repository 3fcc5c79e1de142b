import type * as z from "zod";
import { planDocumentSchema, type PlanDocument } from "./plan-document";

/** One thing wrong with a document: where (`circuits[2].supply.currentA`) and what to do. */
export interface DocumentFault {
  path: string;
  message: string;
}

export type ParsedPlanDocument =
  { ok: true; document: PlanDocument } | { ok: false; faults: DocumentFault[] };

/** Faults listed of one document; a flood says no more than its beginning. */
const MAX_FAULTS = 500;

/** Judges JSON from outside. Never throws; lists every fault with its path, keys that nothing reads among them. */
export function parsePlanDocument(json: unknown): ParsedPlanDocument {
  const parsed = planDocumentSchema.safeParse(json);
  if (parsed.success) return { ok: true, document: parsed.data };
  return { ok: false, faults: parsed.error.issues.flatMap(faultsOf).slice(0, MAX_FAULTS) };
}

/** A path as people and jq read it: `circuits[2].supply.currentA`; the document itself is `document`. */
export function pathText(path: readonly PropertyKey[]): string {
  const text = path.reduce<string>((before, key) => {
    if (typeof key === "number") return `${before}[${key}]`;
    const word = String(key);
    if (/^[A-Za-z_$][\w$-]*$/.test(word)) return before === "" ? word : `${before}.${word}`;
    return `${before}[${JSON.stringify(word)}]`;
  }, "");
  return text === "" ? "document" : text;
}

function faultsOf(issue: z.core.$ZodIssue): DocumentFault[] {
  if (issue.code === "unrecognized_keys") {
    return issue.keys.map((key) => ({
      path: pathText([...issue.path, key]),
      message: "unknown key: nothing reads it, so it is refused; remove it or check its spelling",
    }));
  }
  if (issue.code === "invalid_union" && issue.errors.length > 0) {
    const nested = issue.errors.map((errors) => errors.map((error) => error.message).join(", "));
    return [{ path: pathText(issue.path), message: `fits no form: ${nested.join("; or ")}` }];
  }
  if (issue.code === "invalid_key") {
    return [{ path: pathText(issue.path), message: issue.issues.map((inner) => inner.message).join(", ") }];
  }
  return [{ path: pathText(issue.path), message: issue.message }];
}
