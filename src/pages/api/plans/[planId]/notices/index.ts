import { madeAnswer } from "~/domain/answers/common";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { composeNotice, newNoticeInput } from "~/server/notices/compose";

export const POST = endpoint(
  {
    action: "notice.issue",
    summary: "Begins the notice of a screening as a draft.",
    body: newNoticeInput,
    responses: { 200: madeAnswer, 201: madeAnswer },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope, body }) => {
    const { isNew, ...address } = await composeNotice(principal, named(scope, "plan"), body);
    return json(address, isNew ? 201 : 200);
  },
);
