import { releasedAnswer } from "~/domain/answers/revisions";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { releaseInput, releaseRevision } from "~/server/revisions/release";

export const POST = endpoint(
  {
    action: "revision.release",
    summary:
      "Releases a revision whose flagged positions are all decided, signed by name after a fresh sign-in.",
    body: releaseInput,
    responses: { 200: releasedAnswer },
    refusals: ["sign-in.too-old", "permission.own-edit", "state.conflict"],
  },
  async ({ principal, scope, body, context }) => {
    const { plan, site, revision } = {
      plan: named(scope, "plan"),
      site: named(scope, "site"),
      revision: named(scope, "revision"),
    };
    const { authenticatedAt } = context.locals;
    return json(await releaseRevision(principal, plan, site, revision, body, authenticatedAt));
  },
);
