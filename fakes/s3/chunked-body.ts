import { sameSignature, type Authentication } from "./authenticate";
import { hmac, scopeText, sha256Hex } from "./canonical-request";
import { S3Error } from "./errors";

const emptyHash = sha256Hex("");
const lineEnd = Buffer.from("\r\n");

export interface DecodedBody {
  body: Buffer;
  trailers: Record<string, string>;
}

/**
 * Decodes `Content-Encoding: aws-chunked`: chunks of `size[;chunk-signature=…]`, a last one of size 0 and
 * trailers, each signed on from the signature before it when the payload hash says so.
 */
export function decodeChunkedBody(raw: Buffer, authentication: Authentication): DecodedBody {
  const { payloadHash } = authentication;
  const signed = payloadHash.startsWith("STREAMING-AWS4-HMAC-SHA256-PAYLOAD");
  const withTrailers = payloadHash.endsWith("-TRAILER");
  const parts: Buffer[] = [];
  let previous = authentication.signature;
  let offset = 0;

  const readLine = (): string => {
    const end = raw.indexOf(lineEnd, offset);
    if (end < 0) throw incomplete();
    const line = raw.toString("latin1", offset, end);
    offset = end + 2;
    return line;
  };

  for (;;) {
    const match = /^([0-9a-fA-F]{1,8})(?:;chunk-signature=([0-9a-f]{64}))?$/.exec(readLine());
    if (!match) throw new S3Error("InvalidRequest", "A chunk of the body begins with no size.");
    const size = Number.parseInt(match[1] ?? "", 16);
    if (offset + size > raw.length) throw incomplete();
    const data = raw.subarray(offset, offset + size);
    offset += size;
    if (signed) {
      previous = checkSignature(authentication, "AWS4-HMAC-SHA256-PAYLOAD", match[2] ?? "", [
        previous,
        emptyHash,
        sha256Hex(data),
      ]);
    }
    if (size === 0) break;
    parts.push(data);
    if (readLine() !== "")
      throw new S3Error("InvalidRequest", "A chunk of the body does not end where it says.");
  }

  const trailers: Record<string, string> = {};
  while (withTrailers && offset < raw.length) {
    const line = readLine();
    if (line === "") continue;
    const colon = line.indexOf(":");
    if (colon < 1) throw new S3Error("InvalidRequest", "A trailer of the body has no name.");
    trailers[line.slice(0, colon).toLowerCase()] = line.slice(colon + 1).trim();
  }
  if (signed && withTrailers) checkTrailers(authentication, trailers, previous);
  return { body: Buffer.concat(parts), trailers };
}

function checkTrailers(
  authentication: Authentication,
  trailers: Record<string, string>,
  previous: string,
): void {
  const { "x-amz-trailer-signature": signature = "", ...rest } = trailers;
  const canonical = Object.entries(rest)
    .map(([name, value]) => `${name}:${value}\n`)
    .join("");
  checkSignature(authentication, "AWS4-HMAC-SHA256-TRAILER", signature, [previous, sha256Hex(canonical)]);
  delete trailers["x-amz-trailer-signature"];
}

function checkSignature(
  { key, timestamp, scope }: Authentication,
  algorithm: string,
  given: string,
  rest: readonly string[],
): string {
  const expected = hmac(key, [algorithm, timestamp, scopeText(scope), ...rest].join("\n")).toString("hex");
  if (sameSignature(expected, given)) return given;
  throw new S3Error("SignatureDoesNotMatch", "The signature of a chunk of the body does not match.");
}

const incomplete = () =>
  new S3Error(
    "IncompleteBody",
    "You did not provide the number of bytes specified by the Content-Length HTTP header",
  );
