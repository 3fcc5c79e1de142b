import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { changeNotice, noticeChangeInput } from "~/server/notices/compose";

export const PATCH = endpoint(
  {
    action: "notice.issue",
    summary: "Changes the covering text or the recipients of a draft.",
    body: noticeChangeInput,
  },
  async ({ scope, body }) => {
    const notice = named(scope, "notice");
    await changeNotice(notice, body);
    return json({ id: notice.id });
  },
);
