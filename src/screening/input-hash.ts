import { sha256 } from "@oslojs/crypto/sha2";
import { encodeHexLowerCase } from "@oslojs/encoding";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { resolveDefaults, type ResolvedPlanDocument } from "~/domain/plan-document/resolved";
import { canonicalJson } from "./canonical-json";

/** `sha256:…` of the canonical JSON of a document with its defaults filled in and without `drawing`. */
export function inputHash(document: PlanDocument): string {
  return hashOfResolved(resolveDefaults(document));
}

export function hashOfResolved(document: ResolvedPlanDocument): string {
  return hashOf(hashedPart(document));
}

/** The same of all but the sensors and the document's name: what every sensor is judged by, wherever the others stand. */
export function hashOfSources(document: ResolvedPlanDocument): string {
  return hashOf(hashedPart({ ...document, name: "", sensors: [] }));
}

function hashOf(part: unknown): string {
  const bytes = new TextEncoder().encode(canonicalJson(part));
  return `sha256:${encodeHexLowerCase(sha256(bytes))}`;
}

/** A document as it would be written with every key stated: of a circuit's path and route only the one that it has. */
function hashedPart({ drawing: _drawing, circuits, ...rest }: ResolvedPlanDocument): unknown {
  return {
    ...rest,
    circuits: circuits.map(({ path, route, ...circuit }) =>
      route ? { ...circuit, route } : { ...circuit, path },
    ),
  };
}
