import { Refusal } from "~/domain/errors";
import type { NoticeState } from "~/domain/notice";
import type { Member } from "~/domain/permissions";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { positionsCsv, positionsCsvName } from "~/domain/positions-csv";
import type { ScreeningResult } from "~/domain/screening-result";
import { db } from "../db/client";
import { listNotices } from "../db/queries/notices";
import { findPlan, type PlanRow } from "../db/queries/plans";
import { findScreeningResult } from "../db/queries/screenings";
import { findSite, type SiteRow } from "../db/queries/sites";
import { readScreening } from "./stored";

export interface ScreeningView {
  screening: {
    id: string;
    screenedAt: Date;
    screenedByName: string | null;
    documentVersion: number;
    inputHash: string;
    engineVersion: string;
    /** Whether the working copy is still what was screened. */
    isCurrent: boolean;
  };
  plan: PlanRow;
  site: SiteRow;
  document: PlanDocument;
  result: ScreeningResult;
  notices: { id: string; version: number; state: NoticeState; createdAt: Date }[];
}

const notThere = () =>
  new Refusal("not-found", "The plan of this screening is no longer there. Go back to your Desk.");

/** A screening with all that its page shows. */
export async function screeningView(member: Member, screeningId: string): Promise<ScreeningView> {
  const { organisationId } = member;
  const { document, result, ...screening } = await readScreening(db(), organisationId, screeningId);
  const plan = await findPlan(db(), organisationId, screening.planId);
  const site = plan && (await findSite(db(), organisationId, plan.siteId));
  if (plan === undefined || site === undefined) throw notThere();
  return {
    screening: {
      id: screening.id,
      screenedAt: screening.screenedAt,
      screenedByName: screening.screenedByName,
      documentVersion: screening.documentVersion,
      inputHash: screening.inputHash,
      engineVersion: screening.engineVersion,
      isCurrent: screening.currentVersion === screening.documentVersion,
    },
    plan,
    site,
    document,
    result,
    notices: await listNotices(db(), organisationId, screeningId),
  };
}

/** The result as it was stored, to the byte. */
export async function screeningResultText(member: Member, screeningId: string): Promise<string> {
  const text = await findScreeningResult(db(), member.organisationId, screeningId);
  if (text === undefined) throw notThere();
  return text;
}

export async function screeningCsv(
  member: Member,
  screeningId: string,
): Promise<{ fileName: string; text: string }> {
  const { document, result } = await readScreening(db(), member.organisationId, screeningId);
  return { fileName: positionsCsvName(document.name), text: positionsCsv(document, result) };
}
