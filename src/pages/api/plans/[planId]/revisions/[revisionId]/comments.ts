import { commentedAnswer } from "~/domain/answers/revisions";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { comment, commentInput } from "~/server/revisions/comment";

export const POST = endpoint(
  {
    action: "revision.comment",
    summary: "Says something about a position of a revision; submitter and auditors are told by e-mail.",
    body: commentInput,
    responses: { 201: commentedAnswer },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope, body }) =>
    json(await comment(principal, named(scope, "plan"), named(scope, "revision"), body), 201),
);
