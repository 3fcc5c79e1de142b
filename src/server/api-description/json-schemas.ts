import * as z from "zod";
import { planDocumentSchema } from "~/domain/plan-document/plan-document";
import { screeningResultSchema } from "~/domain/screening-result";

export type JsonSchema = Record<string, unknown>;

interface Rendered {
  zodSchema: unknown;
  jsonSchema: object;
}

/** A tuple has exactly its entries; JSON Schema's prefixItems alone would let it be shorter or longer. */
export function closeTuples({ zodSchema, jsonSchema }: Rendered): void {
  if (!(zodSchema instanceof z.ZodTuple)) return;
  const { length } = zodSchema._zod.def.items;
  Object.assign(jsonSchema, { minItems: length, maxItems: length, items: false });
}

const rendered = (schema: z.ZodType, io: "input" | "output", title: string, description: string) => {
  const { $schema, ...rest } = z.toJSONSchema(schema, { io, override: closeTuples });
  return { $schema, title, description, ...rest } as JsonSchema;
};

/**
 * The plan document as it may be written, keys with defaults left out or not (JSON Schema 2020-12). What holds between parts
 * (ids used twice, references to nothing, arrangements that do not fit their supply) is judged by the server and the command.
 */
export const planSchema = (): JsonSchema =>
  rendered(
    planDocumentSchema,
    "input",
    "Stillneedle plan document",
    "All that a screening needs: metres, degrees, amperes (rms for AC), tesla. References between parts are judged on screening.",
  );

/** The result of a screening (JSON Schema 2020-12). */
export const resultSchema = (): JsonSchema =>
  rendered(
    screeningResultSchema,
    "output",
    "Stillneedle screening result",
    "What a screening finds: every limit of every sensor with its value, uncertainty, verdict and contributions, and the self-checks.",
  );
