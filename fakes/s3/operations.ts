import type { IncomingHttpHeaders } from "node:http";
import { checkWriteConditions, isNotModified, parseRange } from "./conditions";
import { S3Error } from "./errors";
import { listObjects } from "./listing";
import type { ObjectRecord, ObjectStore } from "./object-store";
import { document } from "./xml";

export interface S3Request {
  method: string;
  bucket: string;
  key: string;
  query: URLSearchParams;
  headers: IncomingHttpHeaders;
  body: Buffer;
  now: Date;
}

export interface S3Answer {
  status: number;
  headers?: Record<string, string>;
  body?: Buffer | string;
}

const keptHeaders = new Set([
  "content-type",
  "cache-control",
  "content-disposition",
  "content-language",
  "expires",
]);
const xml = (body: string, status = 200): S3Answer => ({
  status,
  headers: { "content-type": "application/xml" },
  body,
});

/** Queries that stand for another operation on the same address, which this fake has not. */
const foreignQueries = [
  "acl",
  "cors",
  "delete",
  "lifecycle",
  "policy",
  "tagging",
  "uploads",
  "uploadId",
  "versioning",
];

export async function perform(store: ObjectStore, request: S3Request): Promise<S3Answer> {
  const foreign = foreignQueries.find((name) => request.query.has(name));
  if (foreign) throw new S3Error("NotImplemented", `This fake has no ?${foreign} operation.`);
  return request.key === "" ? performOnBucket(store, request) : performOnObject(store, request);
}

async function performOnBucket(store: ObjectStore, request: S3Request): Promise<S3Answer> {
  const { bucket } = request;
  if (bucket === "") throw new S3Error("NotImplemented", "This fake does not list buckets.");
  if (request.method === "PUT") {
    if (await store.hasBucket(bucket)) {
      throw new S3Error(
        "BucketAlreadyOwnedByYou",
        "Your previous request to create the named bucket succeeded.",
      );
    }
    await store.createBucket(bucket);
    return { status: 200, headers: { location: `/${bucket}` } };
  }
  await store.requireBucket(bucket);
  if (request.method === "HEAD") return { status: 200 };
  if (request.method === "GET" && request.query.has("location"))
    return xml(document("LocationConstraint", {}));
  if (request.method === "GET") return xml(await listObjects(store, bucket, request.query));
  throw methodNotAllowed();
}

async function performOnObject(store: ObjectStore, request: S3Request): Promise<S3Answer> {
  await store.requireBucket(request.bucket);
  switch (request.method) {
    case "PUT":
      return request.headers["x-amz-copy-source"] === undefined ? put(store, request) : copy(store, request);
    case "GET":
    case "HEAD":
      return get(store, request);
    case "DELETE":
      await store.delete(request.bucket, request.key);
      return { status: 204 };
    default:
      throw methodNotAllowed();
  }
}

async function put(store: ObjectStore, { bucket, key, headers, body, now }: S3Request): Promise<S3Answer> {
  checkWriteConditions(headers, await store.find(bucket, key));
  const record = await store.put(bucket, key, body, headersToKeep(headers), now);
  return { status: 200, headers: { etag: record.etag } };
}

async function copy(store: ObjectStore, { bucket, key, headers, now }: S3Request): Promise<S3Answer> {
  const source = decodeURIComponent(String(headers["x-amz-copy-source"])).replace(/^\//, "");
  const slash = source.indexOf("/");
  if (slash < 1) throw new S3Error("InvalidArgument", "Copy Source must mention the source bucket and key");
  const sourceBucket = source.slice(0, slash);
  await store.requireBucket(sourceBucket);
  const original = await store.get(sourceBucket, source.slice(slash + 1));
  const replace = headers["x-amz-metadata-directive"] === "REPLACE";
  if (!replace && sourceBucket === bucket && original.key === key) {
    throw new S3Error(
      "InvalidRequest",
      "This copy request is illegal because it is trying to copy an object to itself without changing the object's metadata.",
    );
  }
  checkWriteConditions(headers, await store.find(bucket, key));
  const kept = replace ? headersToKeep(headers) : original.headers;
  const record = await store.put(bucket, key, await store.read(sourceBucket, original), kept, now);
  return xml(document("CopyObjectResult", { LastModified: record.lastModified, ETag: record.etag }));
}

async function get(
  store: ObjectStore,
  { method, bucket, key, query, headers }: S3Request,
): Promise<S3Answer> {
  const record = await store.get(bucket, key);
  const given = { ...headersOf(record), ...overridesOf(query) };
  if (isNotModified(headers, record)) return { status: 304, headers: given };
  const range = parseRange(headers.range, record.sizeBytes);
  const length = range ? range.last - range.first + 1 : record.sizeBytes;
  const answer: S3Answer = {
    status: range ? 206 : 200,
    headers: {
      ...given,
      "accept-ranges": "bytes",
      "content-length": String(length),
      ...(range ? { "content-range": `bytes ${range.first}-${range.last}/${record.sizeBytes}` } : {}),
    },
  };
  if (method === "HEAD") return answer;
  const bytes = await store.read(bucket, record);
  return { ...answer, body: range ? bytes.subarray(range.first, range.last + 1) : bytes };
}

const headersOf = (record: ObjectRecord): Record<string, string> => ({
  "content-type": "binary/octet-stream",
  ...record.headers,
  etag: record.etag,
  "last-modified": new Date(record.lastModified).toUTCString(),
});

/** response-content-type and its like of a signed address. */
function overridesOf(query: URLSearchParams): Record<string, string> {
  const pairs = [...query].filter(([name]) => keptHeaders.has(name.replace(/^response-/, "")));
  return Object.fromEntries(pairs.map(([name, value]) => [name.replace(/^response-/, ""), value]));
}

function headersToKeep(headers: IncomingHttpHeaders): Record<string, string> {
  const kept: Record<string, string> = {};
  for (const [name, value] of Object.entries(headers)) {
    if (typeof value !== "string") continue;
    if (keptHeaders.has(name) || name.startsWith("x-amz-meta-")) kept[name] = value;
  }
  const encoding = String(headers["content-encoding"] ?? "").replace(/aws-chunked,?\s*/, "");
  if (encoding) kept["content-encoding"] = encoding;
  return kept;
}

const methodNotAllowed = () =>
  new S3Error("MethodNotAllowed", "The specified method is not allowed against this resource.");
