import { uriEncode } from "./canonical-request";
import { S3Error } from "./errors";
import type { ObjectRecord, ObjectStore } from "./object-store";
import { document, type XmlTree } from "./xml";

/** ListObjectsV2: prefix, delimiter, start-after, max-keys and continuation tokens. */
export async function listObjects(
  store: ObjectStore,
  bucket: string,
  query: URLSearchParams,
): Promise<string> {
  if (query.get("list-type") !== "2") {
    throw new S3Error("NotImplemented", "This fake lists objects by ListObjectsV2 only (list-type=2).");
  }
  const prefix = query.get("prefix") ?? "";
  const delimiter = query.get("delimiter") ?? "";
  const token = query.get("continuation-token");
  const after = token === null ? (query.get("start-after") ?? "") : decodeToken(token);
  const maxKeys = readMaxKeys(query.get("max-keys"));
  const encoded = query.get("encoding-type") === "url";
  const show = (text: string) => (encoded ? uriEncode(text).replaceAll("%2F", "/") : text);

  const entries = groupByDelimiter(await store.list(bucket, prefix), prefix, delimiter).filter(
    ({ name }) => Buffer.compare(Buffer.from(name), Buffer.from(after)) > 0,
  );
  const page = entries.slice(0, maxKeys);
  const truncated = maxKeys > 0 && entries.length > maxKeys;
  const last = page.at(-1)?.name ?? "";

  const tree: XmlTree = {
    Name: bucket,
    Prefix: show(prefix),
    ...(delimiter ? { Delimiter: show(delimiter) } : {}),
    ...(query.has("start-after") ? { StartAfter: show(query.get("start-after") ?? "") } : {}),
    ...(encoded ? { EncodingType: "url" } : {}),
    KeyCount: page.length,
    MaxKeys: maxKeys,
    IsTruncated: truncated,
    ...(token === null ? {} : { ContinuationToken: token }),
    ...(truncated ? { NextContinuationToken: encodeToken(last) } : {}),
    Contents: page.flatMap(({ record }) => (record ? [describe(record, show)] : [])),
    CommonPrefixes: page.flatMap(({ name, record }) => (record ? [] : [{ Prefix: show(name) }])),
  };
  return document("ListBucketResult", tree);
}

interface Entry {
  /** A key, or a common prefix when there is no record. */
  name: string;
  record?: ObjectRecord;
}

function groupByDelimiter(records: readonly ObjectRecord[], prefix: string, delimiter: string): Entry[] {
  if (!delimiter) return records.map((record) => ({ name: record.key, record }));
  const entries: Entry[] = [];
  for (const record of records) {
    const end = record.key.indexOf(delimiter, prefix.length);
    if (end < 0) entries.push({ name: record.key, record });
    else {
      const name = record.key.slice(0, end + delimiter.length);
      if (entries.at(-1)?.name !== name) entries.push({ name });
    }
  }
  return entries;
}

const describe = (record: ObjectRecord, show: (text: string) => string): XmlTree => ({
  Key: show(record.key),
  LastModified: record.lastModified,
  ETag: record.etag,
  Size: record.sizeBytes,
  StorageClass: "STANDARD",
});

function readMaxKeys(text: string | null): number {
  const value = Number(text ?? 1000);
  if (!Number.isInteger(value) || value < 0) {
    throw new S3Error("InvalidArgument", "Argument maxKeys must be an integer between 0 and 2147483647");
  }
  return Math.min(value, 1000);
}

const encodeToken = (key: string): string => Buffer.from(`after:${key}`).toString("base64url");

function decodeToken(token: string): string {
  const text = Buffer.from(token, "base64url").toString("utf8");
  if (!text.startsWith("after:")) {
    throw new S3Error("InvalidArgument", "The continuation token provided is incorrect");
  }
  return text.slice("after:".length);
}
