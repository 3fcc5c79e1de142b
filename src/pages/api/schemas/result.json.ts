import { jsonSchemaAnswer } from "~/domain/answers/schemas";
import { resultSchema } from "~/server/api-description/json-schemas";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";

export const GET = endpoint(
  {
    action: "schema.read",
    summary: "The JSON Schema of the screening result.",
    responses: { 200: jsonSchemaAnswer },
  },
  () => json(resultSchema()),
);
