import { returnedAnswer } from "~/domain/answers/revisions";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { returnInput, returnRevision } from "~/server/revisions/return";

export const POST = endpoint(
  {
    action: "revision.return",
    summary: "Returns a revision under review to the planner, with reasons.",
    body: returnInput,
    responses: { 200: returnedAnswer },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope, body }) =>
    json(await returnRevision(principal, named(scope, "plan"), named(scope, "revision"), body)),
);
