import { createHash, randomUUID } from "node:crypto";
import { mkdir, readFile, readdir, rename, rm, stat, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { S3Error } from "./errors";

/** What is kept beside an object's bytes. */
export interface ObjectRecord {
  key: string;
  etag: string;
  sizeBytes: number;
  lastModified: string;
  /** Content-Type and the other headers that S3 gives back, and x-amz-meta-*. */
  headers: Record<string, string>;
  /** The file in the bucket's folder that holds the bytes. */
  file: string;
}

const notFound = (error: unknown): boolean => (error as NodeJS.ErrnoException).code === "ENOENT";

/** Buckets as folders; each object a file of bytes and a record by the key's hash, replaced in one step. */
export class ObjectStore {
  constructor(private readonly folder: string) {}

  async createBucket(bucket: string): Promise<void> {
    if (!/^(?!xn--)[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/.test(bucket)) {
      throw new S3Error("InvalidBucketName", "The specified bucket is not valid.", { BucketName: bucket });
    }
    await mkdir(join(this.folder, bucket), { recursive: true, mode: 0o700 });
  }

  async requireBucket(bucket: string): Promise<void> {
    if (!(await this.hasBucket(bucket))) {
      throw new S3Error("NoSuchBucket", "The specified bucket does not exist", { BucketName: bucket });
    }
  }

  async hasBucket(bucket: string): Promise<boolean> {
    if (!/^[a-z0-9][a-z0-9.-]+$/.test(bucket)) return false;
    return stat(join(this.folder, bucket)).then(
      (entry) => entry.isDirectory(),
      () => false,
    );
  }

  async find(bucket: string, key: string): Promise<ObjectRecord | undefined> {
    try {
      return JSON.parse(await readFile(this.recordPath(bucket, key), "utf8")) as ObjectRecord;
    } catch (error) {
      if (notFound(error)) return undefined;
      throw error;
    }
  }

  async get(bucket: string, key: string): Promise<ObjectRecord> {
    const record = await this.find(bucket, key);
    if (!record) throw new S3Error("NoSuchKey", "The specified key does not exist.", { Key: key });
    return record;
  }

  read(bucket: string, record: ObjectRecord): Promise<Buffer> {
    return readFile(join(this.folder, bucket, record.file));
  }

  async put(
    bucket: string,
    key: string,
    bytes: Buffer,
    headers: Record<string, string>,
    now: Date,
  ): Promise<ObjectRecord> {
    const before = await this.find(bucket, key);
    const file = `${randomUUID()}.bytes`;
    const record: ObjectRecord = {
      key,
      etag: `"${createHash("md5").update(bytes).digest("hex")}"`,
      sizeBytes: bytes.length,
      lastModified: now.toISOString(),
      headers,
      file,
    };
    const path = this.recordPath(bucket, key);
    const draft = `${path}.${randomUUID()}.draft`;
    await writeFile(join(this.folder, bucket, file), bytes, { mode: 0o600 });
    await writeFile(draft, JSON.stringify(record), { mode: 0o600 });
    await rename(draft, path);
    if (before) await rm(join(this.folder, bucket, before.file), { force: true });
    return record;
  }

  /** Deleting what is not there is no error, as in S3. */
  async delete(bucket: string, key: string): Promise<void> {
    const record = await this.find(bucket, key);
    if (!record) return;
    await rm(this.recordPath(bucket, key), { force: true });
    await rm(join(this.folder, bucket, record.file), { force: true });
  }

  /** Every object whose key begins with the prefix, in the order of the keys' UTF-8 bytes. */
  async list(bucket: string, prefix: string): Promise<ObjectRecord[]> {
    const names = await readdir(join(this.folder, bucket));
    const records = await Promise.all(
      names
        .filter((name) => name.endsWith(".json"))
        .map(
          async (name) => JSON.parse(await readFile(join(this.folder, bucket, name), "utf8")) as ObjectRecord,
        ),
    );
    return records
      .filter((record) => record.key.startsWith(prefix))
      .sort((a, b) => Buffer.compare(Buffer.from(a.key), Buffer.from(b.key)));
  }

  private recordPath(bucket: string, key: string): string {
    if (Buffer.byteLength(key) > 1024) throw new S3Error("KeyTooLongError", "Your key is too long");
    return join(this.folder, bucket, `${createHash("sha256").update(key).digest("hex")}.json`);
  }
}
