import { mediaTypes } from "~/server/drawings/image-kind";
import { drawingAnswer } from "~/domain/answers/plans";
import { named } from "~/server/auth/scope";
import { storeDrawing } from "~/server/drawings/drawings";
import { uploadedFileName } from "~/server/drawings/file-name";
import { maxUploadBytes } from "~/server/drawings/re-encode";
import { readBody } from "~/server/http/body";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";

export const POST = endpoint(
  {
    action: "drawing.upload",
    summary: "Stores a floor plan; the body is the bytes of a PNG, JPEG or WebP image.",
    ownBody: { mediaTypes: Object.values(mediaTypes) },
    responses: { 201: drawingAnswer },
    refusals: ["request.too-large", "drawing.refused", "service.unavailable"],
  },
  async ({ principal, scope, request }) => {
    const plan = named(scope, "plan");
    const bytes = await readBody(request, maxUploadBytes);
    const fileName = uploadedFileName(request.headers.get("x-file-name"));
    return json(await storeDrawing(principal, plan, { bytes, fileName }), 201);
  },
);
