import { planDocumentJson } from "~/domain/answers/plan-document-json";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { frozenText } from "~/server/revisions/revisions";

export const GET = endpoint(
  {
    action: "revision.read",
    summary: "The plan document that a revision froze, to the byte.",
    responses: { 200: planDocumentJson },
  },
  async ({ scope }) =>
    file(await frozenText(named(scope, "revision"), "document"), {
      mediaType: "application/json; charset=utf-8",
    }),
);
