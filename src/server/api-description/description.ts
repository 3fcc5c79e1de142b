import { createDocument, type ZodOpenApiPathsObject } from "zod-openapi";
import { planDocumentJson } from "~/domain/answers/plan-document-json";
import { sessionCookieName } from "../auth/cookies";
import { env } from "../env";
import type { EndpointDefinition } from "../http/endpoint-definition";
import { closeTuples, planSchema } from "./json-schemas";
import { describeOperation, sessionScheme } from "./operation";

/** An endpoint file: its path from src/pages/api (`./plans/[planId]/index.ts`) and what it exports. */
export interface EndpointFile {
  file: string;
  exports: Readonly<Record<string, unknown>>;
}

const methods = ["GET", "POST", "PUT", "PATCH", "DELETE"] as const;

const pathOf = (file: string): string =>
  file
    .replace(/^\./, "/api")
    .replace(/\.ts$/, "")
    .replace(/\/index$/, "")
    .replace(/\[(\w+)\]/g, "{$1}");

function definitionOf(exported: unknown): EndpointDefinition | undefined {
  if (typeof exported !== "function" || !("definition" in exported)) return undefined;
  return exported.definition as EndpointDefinition;
}

function pathsOf(files: readonly EndpointFile[]): ZodOpenApiPathsObject {
  const paths: ZodOpenApiPathsObject = {};
  for (const { file, exports } of [...files].sort((a, b) => (pathOf(a.file) < pathOf(b.file) ? -1 : 1))) {
    const path = pathOf(file);
    for (const method of methods) {
      const definition = definitionOf(exports[method]);
      if (definition === undefined) continue;
      paths[path] = { ...paths[path], [method.toLowerCase()]: describeOperation(method, path, definition) };
    }
  }
  return paths;
}

/** The OpenAPI 3.1 description of these endpoints, made of their definitions. */
export function describeApi(files: readonly EndpointFile[]) {
  const { $schema: _dialect, ...plan } = planSchema();
  return createDocument(
    {
      openapi: "3.1.0",
      info: {
        title: "Stillneedle",
        version: "1",
        description:
          "Magnetic interference screening. SI units: metre, ampere, tesla, hertz; degrees where a name ends in Deg. Every refusal has one form, with a message that says what happened, where, and what to do. Calls that change something carry the Origin of the application.",
      },
      servers: [{ url: env().appOrigin }],
      paths: pathsOf(files),
      components: {
        securitySchemes: {
          [sessionScheme]: {
            type: "apiKey",
            in: "cookie",
            name: sessionCookieName(),
            description: "The session that signing in starts.",
          },
        },
      },
    },
    {
      override: (rendered) => {
        closeTuples(rendered);
        const isPlan: boolean = (rendered.zodSchema as unknown) === planDocumentJson;
        if (isPlan) Object.assign(rendered.jsonSchema, plan);
      },
    },
  );
}
