import type { Member } from "../../src/domain/permissions";
import { db } from "../../src/server/db/client";
import { findPlan, type PlanRow } from "../../src/server/db/queries/plans";
import { findSite, type SiteRow } from "../../src/server/db/queries/sites";

function there<T>(row: T | undefined): T {
  if (row === undefined) throw new Error("What the demo has just made is not there.");
  return row;
}

export const findSiteOf = async (member: Member, siteId: string): Promise<SiteRow> =>
  there(await findSite(db(), member.organisationId, siteId));

export const findPlanOf = async (member: Member, planId: string): Promise<PlanRow> =>
  there(await findPlan(db(), member.organisationId, planId));
