import type { DocumentFault } from "~/domain/plan-document/faults";

/** A valid document that cannot be computed: each fault with its path, as `parsePlanDocument` lists them. */
export class RefusedDocumentError extends Error {
  override name = "RefusedDocumentError";

  constructor(readonly faults: DocumentFault[]) {
    super(faults.map(({ path, message }) => `${path}: ${message}`).join("\n"));
  }
}
