import { savedAnswer, workingCopyAnswer } from "~/domain/answers/plans";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { documentMaxBytes, saveDocument, saveInput, workingCopyOf } from "~/server/plans/plan-documents";

export const GET = endpoint(
  {
    action: "plan.read",
    summary: "The working copy of a plan with its version.",
    responses: { 200: workingCopyAnswer },
  },
  async ({ scope }) => json(await workingCopyOf(named(scope, "plan"))),
);

export const PUT = endpoint(
  {
    action: "plan.edit",
    summary: "Saves the working copy that was made out of a version.",
    body: saveInput,
    responses: { 200: savedAnswer },
    refusals: ["document.refused", "document.conflict"],
    maxBytes: documentMaxBytes,
  },
  async ({ principal, scope, body }) => json(await saveDocument(principal, named(scope, "plan"), body)),
);
