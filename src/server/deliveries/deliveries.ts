import type { Member } from "~/domain/permissions";
import { db } from "../db/client";
import { listDeliveries, listNoticeDeliveries } from "../db/queries/deliveries";

const listedDeliveries = 200;

/** How far each message of a notice is, by recipient's name. */
export async function noticeDeliveries(member: Member, noticeId: string) {
  return listNoticeDeliveries(db(), member.organisationId, noticeId);
}

/** The organisation's latest messages, newest first. */
export async function organisationDeliveries(member: Member) {
  return listDeliveries(db(), member.organisationId, listedDeliveries);
}
