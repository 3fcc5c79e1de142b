import type * as z from "zod";
import { circuit, route } from "./circuit";
import { equipment } from "./equipment";
import { FaultList, type DocumentFault } from "./faults";
import { loadCase, planDocumentSchema, type PlanDocument } from "./plan-document";
import { sensor } from "./sensor";
import { sizeOf } from "./size";

export type ParsedPlanDocument =
  { ok: true; document: PlanDocument } | { ok: false; faults: DocumentFault[] };

/** Above this many values a document is judged entry by entry first: each wrong value costs a fault's memory. */
const VALUES_AT_ONCE = 200_000;

const entrySchemas: Readonly<Record<string, z.ZodType>> = {
  routes: route,
  circuits: circuit,
  equipment,
  loadCases: loadCase,
  sensors: sensor,
};

/**
 * Judges JSON from outside. Never throws, and takes bounded time and memory whatever it is given; lists every fault with its
 * path, keys that nothing reads among them, as far as `MAX_FAULTS`, and says how many more there are.
 */
export function parsePlanDocument(json: unknown): ParsedPlanDocument {
  const { faults: tooMuch, values } = sizeOf(json);
  if (tooMuch.length > 0) return { ok: false, faults: tooMuch };
  if (values > VALUES_AT_ONCE) {
    const faults = entryFaults(json);
    if (!faults.isEmpty) return { ok: false, faults: faults.faults };
  }
  const parsed = planDocumentSchema.safeParse(json);
  if (parsed.success) return { ok: true, document: parsed.data };
  const faults = new FaultList();
  faults.add(parsed.error.issues);
  return { ok: false, faults: faults.faults };
}

/** Faults inside the entries of the plan's lists, and of what stands beside them, each judged on its own. */
function entryFaults(json: unknown): FaultList {
  const faults = new FaultList();
  if (typeof json !== "object" || json === null || Array.isArray(json)) return faults;
  const beside: Record<string, unknown> = { ...json };
  for (const [list, schema] of Object.entries(entrySchemas)) {
    const entries = beside[list];
    if (!Array.isArray(entries)) continue;
    beside[list] = [];
    for (const [index, entry] of entries.entries()) {
      const { error } = schema.safeParse(entry);
      if (error) faults.add(error.issues, [list, index]);
      if (faults.isFlood) return faults;
    }
  }
  const { error } = planDocumentSchema.safeParse(beside);
  if (error) faults.add(error.issues);
  return faults;
}
