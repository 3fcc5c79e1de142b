import { db } from "../db/client";
import { storedKeysAmong } from "../db/queries/retention";
import { log } from "../log";
import { listObjects, removeObject } from "../storage/objects";

const drawingsPrefix = "drawings/";
const keysPerQuery = 500;

/**
 * Removes drawings' objects that no row names: what an upload that broke off, or a deleted drawing, left behind. Objects
 * stored after `storedBefore` are left alone: their row may be just being written.
 */
export async function sweepStrayObjects(storedBefore: Date): Promise<void> {
  const old = (await listObjects(drawingsPrefix)).filter(({ storedAt }) => storedAt < storedBefore);
  for (let start = 0; start < old.length; start += keysPerQuery) {
    const keys = old.slice(start, start + keysPerQuery).map(({ key }) => key);
    const known = await storedKeysAmong(db(), keys);
    for (const key of keys)
      if (!known.has(key)) {
        await removeObject(key);
        log().info({ key }, "removed an object without a row");
      }
  }
}
