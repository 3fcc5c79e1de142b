import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { documentMaxBytes, saveDocument, saveInput, workingCopyOf } from "~/server/plans/plan-documents";

export const GET = endpoint(
  { action: "plan.read", summary: "The working copy of a plan with its version." },
  async ({ scope }) => json(await workingCopyOf(named(scope, "plan"))),
);

export const PUT = endpoint(
  {
    action: "plan.edit",
    summary: "Saves the working copy that was made out of a version.",
    body: saveInput,
    maxBytes: documentMaxBytes,
  },
  async ({ principal, scope, body }) => json(await saveDocument(principal, named(scope, "plan"), body)),
);
