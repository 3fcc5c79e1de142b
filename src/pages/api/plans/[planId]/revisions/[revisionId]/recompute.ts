import { recomputedAnswer } from "~/domain/answers/revisions";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { recompute } from "~/server/revisions/recompute";

export const POST = endpoint(
  {
    action: "revision.recompute",
    summary: "Screens what a revision froze once more, and says how the result differs from the frozen one.",
    responses: { 200: recomputedAnswer },
    refusals: ["document.refused", "screening.timed-out", "service.unavailable"],
  },
  async ({ principal, scope, request }) =>
    json(await recompute(principal, named(scope, "revision"), request.signal)),
);
