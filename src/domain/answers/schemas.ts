import * as z from "zod";

/** An OpenAPI document; its own standard says the rest. */
export const openApiAnswer = z.looseObject({
  openapi: z.string().startsWith("3.1."),
  paths: z.object({}).loose(),
});

/** A JSON Schema, whose own standard says the rest. */
export const jsonSchemaAnswer = z.looseObject({ $schema: z.string(), type: z.string() });
