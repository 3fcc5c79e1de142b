import { issuedAnswer } from "~/domain/answers/notices";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { issueNotice } from "~/server/notices/issue";

export const POST = endpoint(
  {
    action: "notice.issue",
    summary: "Issues a draft: one message to each of its recipients.",
    responses: { 200: issuedAnswer },
    refusals: ["state.conflict", "input.refused"],
  },
  async ({ principal, scope }) =>
    json(await issueNotice(principal, named(scope, "plan"), named(scope, "notice"))),
);
