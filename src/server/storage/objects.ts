import {
  CreateBucketCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  paginateListObjectsV2,
  PutObjectCommand,
  S3ServiceException,
} from "@aws-sdk/client-s3";
import { Refusal } from "~/domain/errors";
import { env } from "../env";
import { storageClient } from "./client";

const bucket = () => env().s3.bucket;

const unavailable = (cause: unknown) =>
  new Refusal(
    "service.unavailable",
    "The store for drawings does not answer, so nothing was changed. Try again in a minute.",
    { cause },
  );

/** @throws Refusal service.unavailable */
export async function putObject(key: string, bytes: Uint8Array, mediaType: string): Promise<void> {
  try {
    await storageClient().send(
      new PutObjectCommand({
        Bucket: bucket(),
        Key: key,
        Body: bytes,
        ContentLength: bytes.byteLength,
        ContentType: mediaType,
      }),
    );
  } catch (cause) {
    throw unavailable(cause);
  }
}

/** @throws Refusal not-found, service.unavailable */
export async function getObject(key: string): Promise<{ body: ReadableStream; sizeBytes: number }> {
  try {
    const answer = await storageClient().send(new GetObjectCommand({ Bucket: bucket(), Key: key }));
    if (answer.Body === undefined || answer.ContentLength === undefined)
      throw new Error("The store's answer has no body.");
    return { body: answer.Body.transformToWebStream(), sizeBytes: answer.ContentLength };
  } catch (cause) {
    if (cause instanceof S3ServiceException && cause.name === "NoSuchKey")
      throw new Refusal("not-found", "This file is no longer in the store. Upload the drawing again.", {
        cause,
      });
    throw unavailable(cause);
  }
}

/** Removing what is not there is no error. @throws Refusal service.unavailable */
export async function removeObject(key: string): Promise<void> {
  try {
    await storageClient().send(new DeleteObjectCommand({ Bucket: bucket(), Key: key }));
  } catch (cause) {
    throw unavailable(cause);
  }
}

/** Every object whose key begins with `prefix`, and when it was stored. @throws Refusal service.unavailable */
export async function listObjects(prefix: string): Promise<{ key: string; storedAt: Date }[]> {
  const objects: { key: string; storedAt: Date }[] = [];
  try {
    for await (const page of paginateListObjectsV2(
      { client: storageClient() },
      { Bucket: bucket(), Prefix: prefix },
    ))
      for (const { Key, LastModified } of page.Contents ?? [])
        if (Key !== undefined && LastModified !== undefined)
          objects.push({ key: Key, storedAt: LastModified });
  } catch (cause) {
    throw unavailable(cause);
  }
  return objects;
}

/** Every key that begins with `prefix`. @throws Refusal service.unavailable */
export const listObjectKeys = async (prefix: string): Promise<string[]> =>
  (await listObjects(prefix)).map(({ key }) => key);

/** Makes the bucket where it is missing. @throws Refusal service.unavailable */
export async function ensureBucket(): Promise<void> {
  try {
    await storageClient().send(new HeadBucketCommand({ Bucket: bucket() }));
  } catch (cause) {
    if (!(cause instanceof S3ServiceException) || cause.$metadata.httpStatusCode !== 404)
      throw unavailable(cause);
    await storageClient().send(new CreateBucketCommand({ Bucket: bucket() }));
  }
}
