import { openApiAnswer } from "~/domain/answers/schemas";
import { describeApi, type EndpointFile } from "~/server/api-description/description";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { endpointFiles } from "./_endpoint-files";

let description: Promise<object> | undefined;

async function describeAll(): Promise<object> {
  const files = await Promise.all(
    Object.entries(endpointFiles).map(async ([file, load]): Promise<EndpointFile> => ({
      file,
      exports: await load(),
    })),
  );
  return describeApi(files);
}

export const GET = endpoint(
  {
    action: "schema.read",
    summary: "This description: every endpoint in OpenAPI 3.1.",
    responses: { 200: openApiAnswer },
  },
  async () => json(await (description ??= describeAll())),
);
