import * as z from "zod";

/**
 * A plan document inside another body: read as it is, and judged by `parsePlanDocument`, whose faults have paths that begin in
 * the document. The published description shows the plan document's own schema in its place.
 */
export const planDocumentJson = z.unknown().meta({ id: "PlanDocument" });
