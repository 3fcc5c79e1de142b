import { createHash } from "node:crypto";
import { crc32 } from "node:zlib";
import { S3Error } from "./errors";

/** Reflected Castagnoli polynomial (RFC 3720, appendix B.4). */
const castagnoliTable = Uint32Array.from({ length: 256 }, (_, index) => {
  let value = index;
  for (let bit = 0; bit < 8; bit += 1) value = value & 1 ? (value >>> 1) ^ 0x82f63b78 : value >>> 1;
  return value >>> 0;
});

export function crc32c(data: Uint8Array): number {
  let value = 0xffffffff;
  for (const byte of data) value = (castagnoliTable[(value ^ byte) & 0xff] ?? 0) ^ (value >>> 8);
  return (value ^ 0xffffffff) >>> 0;
}

const bigEndian = (value: number): Buffer => {
  const buffer = Buffer.alloc(4);
  buffer.writeUInt32BE(value);
  return buffer;
};

const algorithms: Record<string, (data: Uint8Array) => Buffer> = {
  "x-amz-checksum-crc32": (data) => bigEndian(crc32(data)),
  "x-amz-checksum-crc32c": (data) => bigEndian(crc32c(data)),
  "x-amz-checksum-sha1": (data) => createHash("sha1").update(data).digest(),
  "x-amz-checksum-sha256": (data) => createHash("sha256").update(data).digest(),
  "content-md5": (data) => createHash("md5").update(data).digest(),
};

/**
 * Compares every checksum among the headers or trailers with the body.
 * @throws S3Error BadDigest, or NotImplemented for an algorithm that this fake does not compute
 */
export function verifyChecksums(fields: Record<string, string | undefined>, body: Uint8Array): void {
  for (const [name, given] of Object.entries(fields)) {
    if (given === undefined) continue;
    const algorithm = algorithms[name];
    if (algorithm) {
      if (algorithm(body).toString("base64") === given) continue;
      const shown = name.replace(/^x-amz-checksum-/, "").toUpperCase();
      throw new S3Error("BadDigest", `The ${shown} you specified did not match the calculated checksum.`);
    }
    if (/^x-amz-checksum-(?!algorithm$|type$|mode$)/.test(name)) {
      throw new S3Error("NotImplemented", `This fake does not compute ${name}.`);
    }
  }
}
