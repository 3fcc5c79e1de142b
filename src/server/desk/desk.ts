import { type Member, mayAct, maySeeSite } from "~/domain/permissions";
import type { Verdict } from "~/domain/screening-result";
import { db } from "../db/client";
import { listPlansWithVerdicts } from "../db/queries/desk";
import { listSites } from "../db/queries/sites";

/** A plan with what its latest screening said. */
export interface PlanSummary {
  id: string;
  name: string;
  /** Null where the plan has never been screened. */
  verdict: Verdict | null;
  /** Positions that are undecided or over. */
  flaggedCount: number;
  screeningId: string | null;
  screenedAt: Date | null;
  lastSavedAt: Date;
  /** Whether the working copy was saved after its latest screening, so that the verdict speaks of an older state. */
  changedSinceScreening: boolean;
}

export interface DeskSite {
  id: string;
  name: string;
  place: string;
  timeZone: string;
  plans: PlanSummary[];
}

/** What waits for a member: the sites that they see and, for those who may read drafts, the plans on them. */
export async function deskFor(member: Member): Promise<{ sites: DeskSite[] }> {
  // A member who sees a site without being assigned to it sees every site.
  const seesEverySite = maySeeSite({ ...member, siteIds: [] }, "");
  const sites = await listSites(db(), member.organisationId, seesEverySite ? null : member.siteIds);
  const plans = await planSummaries(
    member,
    sites.map((site) => site.id),
  );
  return { sites: sites.map((site) => ({ ...site, plans: plans.get(site.id) ?? [] })) };
}

/** The plans of each of some sites; empty for a member who may not read drafts. */
export async function planSummaries(
  member: Member,
  siteIds: readonly string[],
): Promise<Map<string, PlanSummary[]>> {
  const bySite = new Map<string, PlanSummary[]>();
  if (!mayAct(member, "plan.read")) return bySite;
  for (const row of await listPlansWithVerdicts(db(), member.organisationId, siteIds)) {
    const { siteId, documentVersion, screenedVersion, ...summary } = row;
    const changedSinceScreening = screenedVersion !== null && screenedVersion !== documentVersion;
    bySite.set(siteId, [...(bySite.get(siteId) ?? []), { ...summary, changedSinceScreening }]);
  }
  return bySite;
}
