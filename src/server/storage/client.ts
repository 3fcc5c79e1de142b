import { S3Client } from "@aws-sdk/client-s3";
import { env } from "../env";

let client: S3Client | undefined;

/** The process's connection to the object store, opened on first use. */
export function storageClient(): S3Client {
  client ??= new S3Client({
    endpoint: env().s3.endpoint,
    region: env().s3.region,
    credentials: {
      accessKeyId: env().s3.accessKeyId,
      secretAccessKey: env().s3.secretAccessKey,
    },
    forcePathStyle: true,
    // Stores other than the original refuse the trailing checksums that the client would send by itself.
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
    maxAttempts: 3,
    requestHandler: { connectionTimeout: 5_000, requestTimeout: 60_000, throwOnRequestTimeout: true },
  });
  return client;
}

export function closeStorage(): void {
  client?.destroy();
  client = undefined;
}
