import { createHash, randomBytes } from "node:crypto";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { type DrawingRow, insertDrawing, listDrawings } from "../db/queries/drawings";
import type { PlanRow } from "../db/queries/plans";
import { log } from "../log";
import { putObject, removeObject } from "../storage/objects";
import { reEncode } from "./re-encode";

/** A drawing as pages and the API speak of it. */
export interface DrawingView {
  id: string;
  widthPx: number;
  heightPx: number;
  fileName: string;
  url: string;
  thumbnailUrl: string;
}

export function drawingView(
  row: Pick<DrawingRow, "id" | "planId" | "widthPx" | "heightPx" | "fileName">,
): DrawingView {
  const { id, planId, widthPx, heightPx, fileName } = row;
  const url = `/api/plans/${planId}/drawings/${id}`;
  return { id, widthPx, heightPx, fileName, url, thumbnailUrl: `${url}/thumbnail` };
}

/** A plan's drawings, the newest first. */
export async function drawingsOf(plan: PlanRow): Promise<DrawingView[]> {
  return (await listDrawings(db(), plan.organisationId, plan.id)).map(drawingView);
}

/**
 * Stores a floor plan: the image drawn anew and its thumbnail in the object store, and its row. Whatever fails, neither
 * a row without its objects nor an object without its row stays behind.
 * @throws Refusal drawing.refused, service.unavailable
 */
export async function storeDrawing(
  member: Member,
  plan: PlanRow,
  upload: { bytes: Uint8Array; fileName: string },
): Promise<DrawingView> {
  const { image, thumbnail } = await reEncode(upload.bytes);
  const row: DrawingRow = {
    id: crypto.randomUUID(),
    organisationId: member.organisationId,
    planId: plan.id,
    storageKey: randomKey(),
    thumbnailKey: randomKey(),
    mediaType: image.mediaType,
    widthPx: image.widthPx,
    heightPx: image.heightPx,
    sizeBytes: image.bytes.byteLength,
    sha256: createHash("sha256").update(image.bytes).digest("hex"),
    fileName: upload.fileName,
    uploadedBy: member.userId,
    uploadedAt: new Date(),
  };
  try {
    await putObject(row.storageKey, image.bytes, image.mediaType);
    await putObject(row.thumbnailKey, thumbnail.bytes, thumbnail.mediaType);
    await insertRow(member, row);
  } catch (error) {
    await removeQuietly([row.storageKey, row.thumbnailKey]);
    throw error;
  }
  return drawingView(row);
}

/** Says nothing of plan, organisation or file: whoever sees a key learns nothing from it. */
const randomKey = () => `drawings/${randomBytes(24).toString("hex")}`;

const insertRow = (member: Member, row: DrawingRow) =>
  db().transaction(async (tx) => {
    await insertDrawing(tx, row);
    await recordActivity(tx, {
      organisationId: row.organisationId,
      actorId: member.userId,
      event: "drawing.uploaded",
      subjectKind: "drawing",
      subjectId: row.id,
      detail: { planId: row.planId, fileName: row.fileName, sha256: row.sha256 },
    });
  });

async function removeQuietly(keys: readonly string[]): Promise<void> {
  for (const key of keys)
    try {
      await removeObject(key);
    } catch {
      // The first failure is what the person must hear of; the key in the log lets the object be removed later.
      log().error({ key }, "an object without a row could not be removed");
    }
}
