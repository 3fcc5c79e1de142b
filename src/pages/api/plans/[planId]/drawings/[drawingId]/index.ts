import { named } from "~/server/auth/scope";
import { serveDrawing } from "~/server/drawings/serve";
import { endpoint } from "~/server/http/endpoint";

export const GET = endpoint(
  { action: "drawing.read", summary: "The image of a drawing." },
  async ({ scope, request }) => serveDrawing(request, named(scope, "drawing"), "image"),
);
