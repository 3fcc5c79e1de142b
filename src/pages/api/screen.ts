import { planDocumentJson } from "~/domain/answers/plan-document-json";
import { resultAnswer } from "~/domain/answers/screenings";
import { readJsonText } from "~/server/http/body";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { documentMaxBytes } from "~/server/plans/plan-documents";
import { screenDocument } from "~/server/screenings/screen-document";

export const POST = endpoint(
  {
    action: "screening.run-stateless",
    summary: "Screens a plan document and keeps nothing of it.",
    // Read and judged where it is screened, so that a large one holds up no other request.
    ownBody: { mediaTypes: ["application/json"], schema: planDocumentJson },
    responses: { 200: resultAnswer },
    refusals: ["document.refused", "screening.busy", "screening.timed-out", "service.unavailable"],
  },
  async ({ principal, request }) => {
    const text = await readJsonText(request, documentMaxBytes);
    return file(await screenDocument(principal, text, request.signal), {
      mediaType: "application/json; charset=utf-8",
    });
  },
);
