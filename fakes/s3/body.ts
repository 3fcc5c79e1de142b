import type { IncomingMessage } from "node:http";
import type { Authentication } from "./authenticate";
import { sha256Hex } from "./canonical-request";
import { verifyChecksums } from "./checksums";
import { decodeChunkedBody } from "./chunked-body";
import { S3Error } from "./errors";

const largestBodyBytes = 128 * 1024 * 1024;

async function readAll(request: IncomingMessage): Promise<Buffer> {
  const parts: Buffer[] = [];
  let lengthBytes = 0;
  for await (const part of request as AsyncIterable<Buffer>) {
    lengthBytes += part.length;
    if (lengthBytes > largestBodyBytes) {
      throw new S3Error("EntityTooLarge", "Your proposed upload exceeds the maximum allowed size");
    }
    parts.push(part);
  }
  return Buffer.concat(parts);
}

/** The object's bytes out of the request, their hash, chunk signatures and checksums verified. */
export async function readBody(request: IncomingMessage, authentication: Authentication): Promise<Buffer> {
  const { payloadHash } = authentication;
  const raw = await readAll(request);
  const headers = request.headers as Record<string, string | undefined>;
  if (request.method !== "PUT") return raw;
  if (payloadHash.startsWith("STREAMING-")) {
    const { body, trailers } = decodeChunkedBody(raw, authentication);
    if (headers["x-amz-decoded-content-length"] === undefined) {
      throw new S3Error("MissingContentLength", "You must provide the Content-Length HTTP header.");
    }
    if (Number(headers["x-amz-decoded-content-length"]) !== body.length) {
      throw new S3Error("IncompleteBody", "The body is not as long as x-amz-decoded-content-length says.");
    }
    verifyChecksums({ ...headers, ...trailers }, body);
    return body;
  }
  if (payloadHash !== "UNSIGNED-PAYLOAD" && payloadHash !== sha256Hex(raw)) {
    throw new S3Error(
      "XAmzContentSHA256Mismatch",
      "The provided 'x-amz-content-sha256' header does not match what was computed.",
      { ClientComputedContentSHA256: payloadHash, S3ComputedContentSHA256: sha256Hex(raw) },
    );
  }
  verifyChecksums(headers, raw);
  return raw;
}
