import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { listNoticeDeliveries } from "../db/queries/deliveries";
import { findNoticeById, listRecipients } from "../db/queries/notices";
import { findPlan } from "../db/queries/plans";
import { findScreeningHeading } from "../db/queries/screenings";
import { findSite, listContacts } from "../db/queries/sites";
import { draftTagOf } from "./draft-tag";

const notThere = () => new Refusal("not-found", "This notice is no longer there. Go back to your Desk.");

/** A notice with all that its page shows: the draft and whom it may go to, or how far each message is. */
export async function noticeView(member: Member, noticeId: string) {
  const { organisationId } = member;
  const notice = await findNoticeById(db(), organisationId, noticeId);
  const found = notice && (await findScreeningHeading(db(), organisationId, notice.screeningId));
  const plan = found && (await findPlan(db(), organisationId, found.planId));
  const site = plan && (await findSite(db(), organisationId, plan.siteId));
  if (notice === undefined || found === undefined || plan === undefined || site === undefined)
    throw notThere();
  const { currentVersion, ...screening } = found;
  const recipients = await listRecipients(db(), organisationId, noticeId);
  return {
    notice,
    screening: { ...screening, isCurrent: currentVersion === screening.documentVersion },
    plan,
    site,
    recipients,
    draftTag: draftTagOf(notice.coveringText, recipients),
    contacts: await listContacts(db(), organisationId, site.id),
    deliveries: await listNoticeDeliveries(db(), organisationId, noticeId),
  };
}

export type NoticeView = Awaited<ReturnType<typeof noticeView>>;
