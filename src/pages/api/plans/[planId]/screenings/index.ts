import { screenedAnswer } from "~/domain/answers/screenings";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { screeningInput, screenPlan } from "~/server/screenings/screen-plan";

export const POST = endpoint(
  {
    action: "screening.run",
    summary: "Screens the saved working copy of a plan and keeps document and result.",
    body: screeningInput,
    responses: { 201: screenedAnswer },
    refusals: ["state.conflict", "document.refused", "screening.timed-out", "service.unavailable"],
  },
  async ({ principal, scope, body, request }) =>
    json(await screenPlan(principal, named(scope, "plan"), body.version, request.signal), 201),
);
