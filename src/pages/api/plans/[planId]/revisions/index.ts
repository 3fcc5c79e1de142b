import { revisionListAnswer, submittedAnswer } from "~/domain/answers/revisions";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { headingOf, planRevisions } from "~/server/revisions/revisions";
import { submitInput, submitRevision } from "~/server/revisions/submit";

export const GET = endpoint(
  {
    action: "revision.read",
    summary: "The revisions of a plan, the newest first.",
    responses: { 200: revisionListAnswer },
  },
  async ({ scope }) => {
    const { revisions } = await planRevisions(named(scope, "plan"));
    return json({ revisions: revisions.map(headingOf) });
  },
);

export const POST = endpoint(
  {
    action: "revision.submit",
    summary: "Screens the working copy of a plan and submits it for review as the next revision.",
    body: submitInput,
    responses: { 201: submittedAnswer },
    refusals: ["state.conflict", "document.refused", "screening.timed-out", "service.unavailable"],
  },
  async ({ principal, scope, body, request }) =>
    json(await submitRevision(principal, named(scope, "plan"), body, request.signal), 201),
);
