import { draftChangedAnswer } from "~/domain/answers/notices";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { changeNotice, noticeChangeInput } from "~/server/notices/compose";

export const PATCH = endpoint(
  {
    action: "notice.issue",
    summary: "Changes the covering text or the recipients of a draft.",
    body: noticeChangeInput,
    responses: { 200: draftChangedAnswer },
    refusals: ["state.conflict"],
  },
  async ({ scope, body }) => {
    const notice = named(scope, "notice");
    return json({ id: notice.id, ...(await changeNotice(notice, body)) });
  },
);
