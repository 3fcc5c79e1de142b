import { mediaTypes } from "~/server/drawings/image-kind";
import { named } from "~/server/auth/scope";
import { serveDrawing } from "~/server/drawings/serve";
import { endpoint } from "~/server/http/endpoint";

export const GET = endpoint(
  {
    action: "drawing.read",
    summary: "A small picture of a drawing.",
    responses: { 200: { mediaTypes: [mediaTypes.webp] }, 304: "empty" },
    refusals: ["service.unavailable"],
  },
  async ({ scope, request }) => serveDrawing(request, named(scope, "drawing"), "thumbnail"),
);
