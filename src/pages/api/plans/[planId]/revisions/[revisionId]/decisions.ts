import { decidedAnswer } from "~/domain/answers/revisions";
import { decisionInput } from "~/domain/decision";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { decide } from "~/server/revisions/decide";

export const POST = endpoint(
  {
    action: "revision.decide",
    summary: "Decides on a flagged position of a revision under review; a concession needs a fresh sign-in.",
    body: decisionInput,
    responses: { 201: decidedAnswer },
    refusals: ["sign-in.too-old", "permission.own-edit", "state.conflict"],
  },
  async ({ principal, scope, body, context }) => {
    const site = named(scope, "site");
    const revision = named(scope, "revision");
    return json(await decide(principal, site, revision, body, context.locals.authenticatedAt), 201);
  },
);
