import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { file } from "~/server/http/respond";
import { noticePreview, previewPolicy } from "~/server/notices/preview";

export const GET = endpoint(
  {
    action: "notice.read",
    summary: "What the notice says, as the plain text that its recipients get.",
    responses: { 200: { mediaTypes: ["text/plain"] } },
  },
  async ({ principal, scope }) => {
    const { text } = await noticePreview(principal, named(scope, "plan"), named(scope, "notice"));
    return file(text, { mediaType: "text/plain; charset=utf-8", contentSecurityPolicy: previewPolicy });
  },
);
