import { randomUUID } from "node:crypto";
import { createServer, type IncomingMessage, type Server, type ServerResponse } from "node:http";
import { authenticate, type Credentials } from "./authenticate";
import { readBody } from "./body";
import { S3Error } from "./errors";
import { ObjectStore } from "./object-store";
import { perform, type S3Answer } from "./operations";
import { errorDocument } from "./xml";

export interface S3FakeOptions {
  dataFolder: string;
  credentials: Credentials;
  now?: () => Date;
}

/** S3 with path-style addresses on node:http: real signatures, real errors, files on disk. */
export function createS3Server({ dataFolder, credentials, now = () => new Date() }: S3FakeOptions): Server {
  const store = new ObjectStore(dataFolder);
  return createServer((request, response) => {
    void answer(store, credentials, now(), request).then(
      (result) => send(request, response, result),
      (error: unknown) => response.destroy(error instanceof Error ? error : undefined),
    );
  });
}

async function answer(
  store: ObjectStore,
  credentials: Credentials,
  now: Date,
  request: IncomingMessage,
): Promise<S3Answer> {
  const [rawPath = "/", rawQuery = ""] = (request.url ?? "/").split("?", 2);
  try {
    const method = request.method ?? "GET";
    // "+" is a plus sign in a signed query, not a space.
    const query = new URLSearchParams(rawQuery.replaceAll("+", "%2B"));
    const signed = { method, rawPath, query, headers: request.headers };
    const authentication = authenticate(signed, credentials, now);
    const body = await readBody(request, authentication);
    const [bucket = "", ...keyParts] = rawPath.slice(1).split("/").map(decodeURIComponent);
    return await perform(store, { ...signed, bucket, key: keyParts.join("/"), body, now });
  } catch (error) {
    const known =
      error instanceof S3Error ? error : new S3Error("InternalError", `The fake failed: ${String(error)}`);
    request.resume();
    const requestId = randomUUID();
    return {
      status: known.status,
      headers: { "content-type": "application/xml" },
      body: errorDocument(known, rawPath, requestId),
    };
  }
}

function send(request: IncomingMessage, response: ServerResponse, { status, headers, body }: S3Answer): void {
  response.writeHead(status, { "x-amz-request-id": randomUUID(), server: "fake S3", ...headers });
  if (request.method === "HEAD" || body === undefined) response.end();
  else response.end(body);
}
