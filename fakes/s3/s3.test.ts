import { mkdtemp, readdir, rm } from "node:fs/promises";
import type { Server } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import {
  CopyObjectCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
  type S3ClientConfig,
} from "@aws-sdk/client-s3";
import { getSignedUrl } from "@aws-sdk/s3-request-presigner";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { listenOnLoopback } from "../process/lifetime";
import { ObjectStore } from "./object-store";
import { createS3Server } from "./server";

const Bucket = "drawings";
let folder: string;
let server: Server;
let endpoint: string;
let clockOffsetMs = 0;

function client(more: S3ClientConfig = {}): S3Client {
  return new S3Client({
    endpoint,
    region: "eu-test-1",
    forcePathStyle: true,
    credentials: { accessKeyId: "key", secretAccessKey: "secret" },
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
    maxAttempts: 1,
    ...more,
  });
}

const put = (Key: string, Body: string | Uint8Array, more = {}) =>
  client().send(new PutObjectCommand({ Bucket, Key, Body, ...more }));
const read = async (Key: string, more = {}) => {
  const answer = await client().send(new GetObjectCommand({ Bucket, Key, ...more }));
  return { ...answer, text: await answer.Body?.transformToString() };
};

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), "s3-fake-"));
  await new ObjectStore(folder).createBucket(Bucket);
  server = createS3Server({
    dataFolder: folder,
    credentials: { accessKeyId: "key", secretAccessKey: "secret", region: "eu-test-1" },
    now: () => new Date(Date.now() + clockOffsetMs),
  });
  await listenOnLoopback(server, 0);
  endpoint = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
});

afterAll(async () => {
  server.closeAllConnections();
  server.close();
  await rm(folder, { recursive: true });
});

describe("objects", () => {
  test("come back with their bytes, type and metadata", async () => {
    const bytes = Uint8Array.from({ length: 3_000_000 }, (_, index) => (index * 7919) % 256);
    await put("plans/a b+c/ünï(1).png", bytes, { ContentType: "image/png", Metadata: { sheet: "G 01" } });
    const answer = await client().send(new GetObjectCommand({ Bucket, Key: "plans/a b+c/ünï(1).png" }));
    expect(answer.ContentType).toBe("image/png");
    expect(answer.Metadata).toEqual({ sheet: "G 01" });
    expect(Buffer.compare((await answer.Body?.transformToByteArray()) ?? Buffer.alloc(0), bytes)).toBe(0);
  });

  test("head answers like get without a body; a missing one is NoSuchKey", async () => {
    await put("head", "12345");
    const head = await client().send(new HeadObjectCommand({ Bucket, Key: "head" }));
    expect(head.ContentLength).toBe(5);
    expect(head.ETag).toBe('"827ccb0eea8a706c4c34a16891f84e7b"');
    await expect(client().send(new HeadObjectCommand({ Bucket, Key: "none" }))).rejects.toMatchObject({
      name: "NotFound",
    });
    await expect(read("none")).rejects.toMatchObject({ name: "NoSuchKey", Key: "none" });
    await expect(
      client().send(new GetObjectCommand({ Bucket: "elsewhere", Key: "x" })),
    ).rejects.toMatchObject({ name: "NoSuchBucket" });
  });

  test("ranges", async () => {
    await put("range", "0123456789");
    expect(await read("range", { Range: "bytes=2-4" })).toMatchObject({
      text: "234",
      ContentRange: "bytes 2-4/10",
      $metadata: { httpStatusCode: 206 },
    });
    expect((await read("range", { Range: "bytes=-3" })).text).toBe("789");
    expect((await read("range", { Range: "bytes=8-99" })).text).toBe("89");
    await expect(read("range", { Range: "bytes=10-" })).rejects.toMatchObject({ name: "InvalidRange" });
  });

  test("deleting takes the files off the disk, and twice is no error", async () => {
    const before = (await readdir(join(folder, Bucket))).length;
    await put("gone", "x");
    await put("gone", "y");
    for (let round = 0; round < 2; round += 1) {
      await client().send(new DeleteObjectCommand({ Bucket, Key: "gone" }));
    }
    await expect(read("gone")).rejects.toMatchObject({ name: "NoSuchKey" });
    expect(await readdir(join(folder, Bucket))).toHaveLength(before);
  });

  test("If-None-Match lets nobody overwrite", async () => {
    await put("once", "first", { IfNoneMatch: "*" });
    await expect(put("once", "second", { IfNoneMatch: "*" })).rejects.toMatchObject({
      name: "PreconditionFailed",
      $metadata: { httpStatusCode: 412 },
    });
    expect((await read("once")).text).toBe("first");
  });

  test("copy keeps the metadata or replaces it", async () => {
    await put("original", "bytes", { ContentType: "text/plain", Metadata: { floor: "2" } });
    const copy = (more = {}) =>
      client().send(
        new CopyObjectCommand({ Bucket, Key: "copies/one", CopySource: `${Bucket}/original`, ...more }),
      );
    expect((await copy()).CopyObjectResult?.ETag).toBe((await read("original")).ETag);
    expect(await read("copies/one")).toMatchObject({ text: "bytes", Metadata: { floor: "2" } });
    await copy({ MetadataDirective: "REPLACE", Metadata: { floor: "3" }, ContentType: "text/csv" });
    expect(await read("copies/one")).toMatchObject({ ContentType: "text/csv", Metadata: { floor: "3" } });
  });
});

describe("listing", () => {
  test("pages through every key in byte order", async () => {
    const keys = Array.from({ length: 7 }, (_, index) => `list/<${index}>&é`).concat("list/Z", "list/zz");
    for (const key of [...keys].reverse()) await put(key, "x");
    const seen: (string | undefined)[] = [];
    let ContinuationToken: string | undefined;
    do {
      const page = await client().send(
        new ListObjectsV2Command({
          Bucket,
          Prefix: "list/",
          MaxKeys: 4,
          ...(ContinuationToken ? { ContinuationToken } : {}),
        }),
      );
      expect(page.KeyCount).toBeLessThanOrEqual(4);
      seen.push(...(page.Contents ?? []).map((one) => one.Key));
      ContinuationToken = page.NextContinuationToken;
    } while (ContinuationToken);
    expect(seen).toEqual(keys);
  });

  test("groups by a delimiter", async () => {
    for (const key of ["tree/a/1", "tree/a/2", "tree/b/1", "tree/c"]) await put(key, "x");
    const page = await client().send(new ListObjectsV2Command({ Bucket, Prefix: "tree/", Delimiter: "/" }));
    expect(page.CommonPrefixes?.map((one) => one.Prefix)).toEqual(["tree/a/", "tree/b/"]);
    expect(page.Contents?.map((one) => one.Key)).toEqual(["tree/c"]);
  });
});

describe("streamed bodies (aws-chunked)", () => {
  test.each(["CRC32", "CRC32C", "SHA1", "SHA256"] as const)(
    "with a %s trailer",
    async (ChecksumAlgorithm) => {
      const Body = Readable.from([Buffer.alloc(70_000, 1), Buffer.alloc(9_000, 2)]);
      await client({ requestChecksumCalculation: "WHEN_SUPPORTED" }).send(
        new PutObjectCommand({ Bucket, Key: "streamed", Body, ContentLength: 79_000, ChecksumAlgorithm }),
      );
      const head = await client().send(new HeadObjectCommand({ Bucket, Key: "streamed" }));
      expect(head).toMatchObject({ ContentLength: 79_000 });
      expect(head.ContentEncoding).toBeUndefined();
    },
  );
});

describe("signatures", () => {
  const refused = (more: S3ClientConfig) =>
    client(more).send(new PutObjectCommand({ Bucket, Key: "never", Body: "x" }));

  test("a wrong secret, key or region is refused", async () => {
    const wrongSecret = { credentials: { accessKeyId: "key", secretAccessKey: "guess" } };
    await expect(refused(wrongSecret)).rejects.toMatchObject({
      name: "SignatureDoesNotMatch",
      $metadata: { httpStatusCode: 403 },
    });
    const wrongKey = { credentials: { accessKeyId: "other", secretAccessKey: "secret" } };
    await expect(refused(wrongKey)).rejects.toMatchObject({ name: "InvalidAccessKeyId" });
    await expect(refused({ region: "eu-test-2" })).rejects.toMatchObject({
      name: "AuthorizationHeaderMalformed",
    });
    await expect(read("never")).rejects.toMatchObject({ name: "NoSuchKey" });
  });

  test("an unsigned request is refused", async () => {
    const answer = await fetch(`${endpoint}/${Bucket}/range`);
    expect(answer.status).toBe(403);
    expect(await answer.text()).toContain("<Code>AccessDenied</Code>");
  });

  test("a request from a wrong clock is refused", async () => {
    clockOffsetMs = 16 * 60_000;
    try {
      await expect(read("range")).rejects.toMatchObject({ name: "RequestTimeTooSkewed" });
    } finally {
      clockOffsetMs = 0;
    }
  });

  test("a body changed on its way is refused", async () => {
    const tampering = client();
    tampering.middlewareStack.add(
      (next) => (args) => {
        (args.request as { body: string }).body = "changed";
        return next(args);
      },
      { step: "finalizeRequest", priority: "low" },
    );
    await expect(
      tampering.send(new PutObjectCommand({ Bucket, Key: "never", Body: "genuine" })),
    ).rejects.toMatchObject({ name: "XAmzContentSHA256Mismatch" });
  });

  test("a presigned address reads until it expires, and only what it names", async () => {
    await put("signed/a", "by address");
    const address = await getSignedUrl(client(), new GetObjectCommand({ Bucket, Key: "signed/a" }), {
      expiresIn: 60,
    });
    expect(await (await fetch(address)).text()).toBe("by address");
    expect((await fetch(address.replace("signed/a", "range"))).status).toBe(403);
    expect((await fetch(address.replace("X-Amz-Expires=60", "X-Amz-Expires=6000"))).status).toBe(403);
    clockOffsetMs = 61_000;
    try {
      const late = await fetch(address);
      expect(late.status).toBe(403);
      expect(await late.text()).toContain("Request has expired");
    } finally {
      clockOffsetMs = 0;
    }
  });
});
