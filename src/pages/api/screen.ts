import { z } from "zod";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { documentMaxBytes } from "~/server/plans/plan-documents";
import { screenDocument } from "~/server/screenings/screen-document";

export const POST = endpoint(
  {
    action: "screening.run-stateless",
    summary: "Screens a plan document and keeps nothing of it.",
    // The document's own schema judges it; its faults have paths that begin in the document.
    body: z.unknown(),
    maxBytes: documentMaxBytes,
  },
  async ({ principal, body, request }) =>
    file(await screenDocument(principal, body, request.signal), {
      mediaType: "application/json; charset=utf-8",
    }),
);
