import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { changeNotice, noticeChangeInput } from "~/server/notices/compose";

export const PATCH = endpoint(
  {
    action: "notice.issue",
    summary: "Changes the covering text or the recipients of a draft.",
    body: noticeChangeInput,
  },
  async ({ scope, body }) => {
    await changeNotice(named(scope, "notice"), body);
    return noContent();
  },
);
