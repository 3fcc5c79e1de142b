import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import type { NoticeRow } from "../db/queries/notices";
import type { PlanRow } from "../db/queries/plans";
import { messageOfNotice } from "./render";

/**
 * Mail keeps its styles in its tags, which no page of this application may. So its preview is a document of its own that
 * may do nothing else, and that pages of this application may frame.
 */
export const previewPolicy = "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'self'; sandbox";

/** The very texts that recipients get, or would get now. */
export async function noticePreview(
  member: Member,
  plan: PlanRow,
  notice: NoticeRow,
): Promise<{ html: string; text: string }> {
  const { html, text } = await messageOfNotice(db(), member, plan, notice);
  return { html, text };
}
