import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { noticePreview, previewPolicy } from "~/server/notices/preview";

export const GET = endpoint(
  {
    action: "notice.read",
    summary: "What the notice says, as the HTML that its recipients get.",
    responses: { 200: { mediaTypes: ["text/html"] } },
  },
  async ({ principal, scope }) => {
    const { html } = await noticePreview(principal, named(scope, "plan"), named(scope, "notice"));
    return file(html, { mediaType: "text/html; charset=utf-8", contentSecurityPolicy: previewPolicy });
  },
);
