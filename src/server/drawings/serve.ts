import type { DrawingRow } from "../db/queries/drawings";
import { file } from "../http/respond";
import { getObject } from "../storage/objects";
import { mediaTypes } from "./image-kind";

/** The bytes behind a drawing's address never change, and only its own browser may keep them. */
const cacheControl = "private, max-age=31536000, immutable";

/**
 * Answers with a drawing's image or thumbnail, streamed out of the object store; 304 to a browser that has it.
 * @throws Refusal not-found, service.unavailable
 */
export async function serveDrawing(
  request: Request,
  drawing: DrawingRow,
  part: "image" | "thumbnail",
): Promise<Response> {
  const etag = part === "image" ? `"${drawing.sha256}"` : `"${drawing.sha256}-thumbnail"`;
  if (matches(request.headers.get("if-none-match"), etag))
    return new Response(null, { status: 304, headers: { ETag: etag, "Cache-Control": cacheControl } });
  const { body, sizeBytes } = await getObject(part === "image" ? drawing.storageKey : drawing.thumbnailKey);
  const mediaType = part === "image" ? drawing.mediaType : mediaTypes.webp;
  const response = file(body, { mediaType, cacheControl });
  response.headers.set("ETag", etag);
  response.headers.set("Content-Length", String(sizeBytes));
  return response;
}

const matches = (header: string | null, etag: string): boolean =>
  (header ?? "").split(",").some((each) => each.trim().replace(/^W\//, "") === etag);
