import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { listNoticeDeliveries } from "../db/queries/deliveries";

/** How far each message of a notice is, by recipient's name. */
export async function noticeDeliveries(member: Member, noticeId: string) {
  return listNoticeDeliveries(db(), member.organisationId, noticeId);
}
