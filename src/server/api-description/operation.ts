import * as z from "zod";
import type { ZodOpenApiOperationObject, ZodOpenApiResponseObject } from "zod-openapi";
import { errorAnswer } from "~/domain/answers/common";
import { permissions } from "~/domain/permissions";
import type { AnswerBody, EndpointDefinition } from "../http/endpoint-definition";
import { allowedTo, byStatus, refusalsOf } from "./refusals";

/** Name of the one security scheme: the session's cookie. */
export const sessionScheme = "session";

const formMediaType = "application/x-www-form-urlencoded";

const statusWords: Record<string, string> = {
  200: "Done.",
  201: "Made.",
  202: "Accepted; it is done afterwards.",
  204: "Done; there is nothing to read.",
  303: "Goes on to the page that Location names.",
  304: "The browser has it already.",
};

function answered(status: string, body: AnswerBody): ZodOpenApiResponseObject {
  const description = statusWords[status] ?? "Answered.";
  if (body === "empty") return { description };
  if ("mediaTypes" in body)
    return { description, content: Object.fromEntries(body.mediaTypes.map((type) => [type, {}])) };
  return { description, content: { "application/json": { schema: body } } };
}

function requestBody({
  body,
  ownBody,
  form,
}: EndpointDefinition): Pick<ZodOpenApiOperationObject, "requestBody"> {
  if (ownBody !== undefined) {
    const { mediaTypes, schema } = ownBody;
    const content = Object.fromEntries(
      mediaTypes.map((type) => [type, schema === undefined ? {} : { schema }]),
    );
    return { requestBody: { required: true, content } };
  }
  if (body === undefined) return {};
  const content = {
    "application/json": { schema: body },
    ...(form && { [formMediaType]: { schema: body } }),
  };
  return { requestBody: { required: true, content } };
}

/** "GET /plans/{planId}/document" becomes "getPlansByPlanIdDocument": one id for each operation. */
function operationId(method: string, path: string): string {
  const words = path.split(/[^\w{}]+/).map((word) => word.replace(/^\{(.*)\}$/, "by-$1"));
  return [method.toLowerCase(), ...words.slice(1).flatMap((word) => word.split(/[-_]/))]
    .filter((word) => word !== "" && word !== "api")
    .map((word, index) => (index === 0 ? word : word.charAt(0).toUpperCase() + word.slice(1)))
    .join("");
}

/** Describes one endpoint by its definition; `path` has its parameters in braces. */
export function describeOperation(
  method: string,
  path: string,
  definition: EndpointDefinition,
): ZodOpenApiOperationObject {
  const { action, summary, query, responses = {} } = definition;
  const parameters = [...path.matchAll(/\{(\w+)\}/g)].map(([, name = ""]) => name);
  const refusals = byStatus(refusalsOf(method, parameters.length > 0, definition)).map(
    ([status, codes]): [string, ZodOpenApiResponseObject] => [
      String(status),
      {
        description: `Refused: ${codes.join(", ")}.`,
        content: { "application/json": { schema: errorAnswer } },
      },
    ],
  );
  const isOpen = permissions[action].allow === "anyone";
  return {
    operationId: operationId(method, path),
    summary,
    description: `${allowedTo(action)} Action: ${action}.`,
    tags: [path.split("/")[2] ?? ""],
    security: isOpen ? [] : [{ [sessionScheme]: [] }],
    requestParams: {
      ...(parameters.length > 0 && {
        path: z.object(Object.fromEntries(parameters.map((name) => [name, z.uuid()]))),
      }),
      ...(query instanceof z.ZodObject && { query }),
    },
    ...requestBody(definition),
    responses: Object.fromEntries([
      ...Object.entries(responses).map(([status, body]) => [status, answered(status, body)] as const),
      ...refusals,
    ]),
  };
}
