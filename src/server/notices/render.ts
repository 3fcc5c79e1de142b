import type { Member } from "~/domain/permissions";
import { positionsCsv, positionsCsvName } from "~/domain/positions-csv";
import type { Queryable } from "../db/client";
import { findNoticeMessage, type NoticeMessageRow, type NoticeRow } from "../db/queries/notices";
import { findMember } from "../db/queries/people";
import type { PlanRow } from "../db/queries/plans";
import { findSite } from "../db/queries/sites";
import { env } from "../env";
import { noticeContent } from "../mail/screening-notice/content";
import { noticeHtml } from "../mail/screening-notice/html";
import { noticeText } from "../mail/screening-notice/text";
import { readScreening } from "../screenings/stored";

/** What the notice says: as it was issued, or as it would be if `member` issued it now. */
export async function messageOfNotice(
  db: Queryable,
  member: Member,
  plan: PlanRow,
  notice: NoticeRow,
): Promise<NoticeMessageRow> {
  const issued = await findNoticeMessage(db, plan.organisationId, notice.id);
  return issued ?? composeMessage(db, member, plan, notice);
}

/** Composes the message that goes out under the member's name and is answered to them. */
export async function composeMessage(
  db: Queryable,
  member: Member,
  plan: PlanRow,
  notice: NoticeRow,
): Promise<NoticeMessageRow> {
  const { organisationId } = plan;
  const screening = await readScreening(db, organisationId, notice.screeningId);
  const site = await findSite(db, organisationId, plan.siteId);
  const planner = await findMember(db, organisationId, member.userId);
  if (site === undefined || planner === undefined)
    throw new Error("A notice has lost its site or its planner.");
  const { document, result } = screening;
  const content = noticeContent({
    site,
    plan,
    screening,
    notice,
    plannerName: planner.name,
    document,
    result,
    resultUrl: `${env().appOrigin}/plans/${plan.id}/screenings/${screening.id}`,
  });
  return {
    noticeId: notice.id,
    subject: content.subject,
    html: noticeHtml(content),
    text: noticeText(content),
    positionsCsv: positionsCsv(document, result),
    csvFileName: positionsCsvName(plan.name),
    replyToName: planner.name,
    replyToEmail: planner.email,
  };
}
