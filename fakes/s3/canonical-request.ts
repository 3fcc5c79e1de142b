import { createHash, createHmac } from "node:crypto";
import type { IncomingHttpHeaders } from "node:http";

/** Signature Version 4 as "Authenticating Requests (AWS Signature Version 4)" of the Amazon S3 API reference. */
export const sha256Hex = (data: string | Uint8Array): string =>
  createHash("sha256").update(data).digest("hex");

export const hmac = (key: string | Uint8Array, data: string): Buffer =>
  createHmac("sha256", key).update(data, "utf8").digest();

/** UriEncode: everything but the unreserved characters of RFC 3986. */
export const uriEncode = (text: string): string =>
  encodeURIComponent(text).replace(
    /[!'()*]/g,
    (character) => `%${character.charCodeAt(0).toString(16).toUpperCase()}`,
  );

export interface CanonicalParts {
  method: string;
  /** The path as it was sent, percent-encoded. */
  rawPath: string;
  query: URLSearchParams;
  headers: IncomingHttpHeaders;
  signedHeaders: readonly string[];
  payloadHash: string;
}

export function canonicalRequest(parts: CanonicalParts): string {
  const path = parts.rawPath
    .split("/")
    .map((segment) => uriEncode(decodeURIComponent(segment)))
    .join("/");
  const query = [...parts.query]
    .filter(([name]) => name !== "X-Amz-Signature")
    .map(([name, value]) => [uriEncode(name), uriEncode(value)] as const)
    .sort(([a, x], [b, y]) => compareBytes(a, b) || compareBytes(x, y))
    .map(([name, value]) => `${name}=${value}`)
    .join("&");
  const headers = parts.signedHeaders
    .map((name) => `${name}:${canonicalValue(parts.headers[name])}\n`)
    .join("");
  return [parts.method, path, query, headers, parts.signedHeaders.join(";"), parts.payloadHash].join("\n");
}

const canonicalValue = (value: string | string[] | undefined): string =>
  [value ?? ""]
    .flat()
    .map((one) => one.trim().replace(/ +/g, " "))
    .join(",");

export const compareBytes = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

export interface Scope {
  /** yyyymmdd */
  date: string;
  region: string;
}

export const scopeText = ({ date, region }: Scope): string => `${date}/${region}/s3/aws4_request`;

export function signingKey(secret: string, { date, region }: Scope): Buffer {
  const dateKey = hmac(`AWS4${secret}`, date);
  return hmac(hmac(hmac(dateKey, region), "s3"), "aws4_request");
}

export const stringToSign = (timestamp: string, scope: Scope, request: string): string =>
  ["AWS4-HMAC-SHA256", timestamp, scopeText(scope), sha256Hex(request)].join("\n");
