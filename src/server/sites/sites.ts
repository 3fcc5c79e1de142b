import { type Fault, Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import type { EarthElements } from "~/domain/screening-result";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { isDuplicateEntry } from "../db/duplicate-entry";
import {
  findSite,
  insertSite,
  listContacts,
  type SiteContactRow,
  type SiteRow,
  updateSite,
} from "../db/queries/sites";
import { type PlanSummary, planSummaries } from "../desk/desk";
import { earthElementsAt } from "./earth-at-site";
import type { SiteChangeInput, SiteInput } from "./site-input";

const refuseInput = (fault: Fault, cause?: unknown) =>
  new Refusal("input.refused", fault.message, { faults: [fault], cause });

/** Runs `write`, and answers a name that another site of the organisation has. @throws Refusal input.refused */
async function withFreeName<T>(name: string, write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (!isDuplicateEntry(error, "sites_name")) throw error;
    throw refuseInput(
      { path: "name", message: `Your organisation already has a site called ${name}. Choose another name.` },
      error,
    );
  }
}

/** @throws Refusal input.refused where the name is taken */
export async function createSite(member: Member, input: SiteInput): Promise<{ id: string; url: string }> {
  const id = crypto.randomUUID();
  const { organisationId, userId: actorId } = member;
  await withFreeName(input.name, () =>
    db().transaction(async (tx) => {
      await insertSite(tx, { ...input, id, organisationId, createdAt: new Date(), archivedAt: null });
      await recordActivity(tx, {
        organisationId,
        actorId,
        event: "site.created",
        subjectKind: "site",
        subjectId: id,
        detail: { name: input.name },
      });
    }),
  );
  return { id, url: `/sites/${id}` };
}

/**
 * Changes what `change` names.
 * @returns The site as it is afterwards.
 * @throws Refusal input.refused where the name is taken, or one of latitude and longitude would stand alone
 */
export async function changeSite(member: Member, site: SiteRow, change: SiteChangeInput): Promise<SiteRow> {
  const changed = Object.fromEntries(
    Object.entries(change).filter(
      ([key, value]) => value !== undefined && value !== site[key as keyof SiteRow],
    ),
  );
  const after: SiteRow = { ...site, ...changed };
  if ((after.latitudeDeg === null) !== (after.longitudeDeg === null))
    throw refuseInput({
      path: after.latitudeDeg === null ? "latitudeDeg" : "longitudeDeg",
      message: "Give both latitude and longitude, or neither.",
    });
  if (Object.keys(changed).length === 0) return site;
  const { organisationId, userId: actorId } = member;
  await withFreeName(after.name, () =>
    db().transaction(async (tx) => {
      await updateSite(tx, organisationId, site.id, changed);
      await recordActivity(tx, {
        organisationId,
        actorId,
        event: "site.changed",
        subjectKind: "site",
        subjectId: site.id,
        detail: { from: pick(site, Object.keys(changed)), to: changed },
      });
    }),
  );
  return after;
}

const pick = (site: SiteRow, keys: readonly string[]) =>
  Object.fromEntries(Object.entries(site).filter(([key]) => keys.includes(key)));

export interface SiteOverview {
  site: SiteRow;
  /** Empty for a member who may not read drafts. */
  plans: PlanSummary[];
  contacts: SiteContactRow[];
  /** Of today, at the site; null while nobody has stated where on earth it is. */
  earthField: EarthElements | null;
}

/** @throws Refusal not-found where the organisation has no such site */
export async function siteOverview(member: Member, siteId: string): Promise<SiteOverview> {
  const site = await findSite(db(), member.organisationId, siteId);
  if (site === undefined)
    throw new Refusal("not-found", "There is no such site, or it is not yours to see. Go back to your Desk.");
  return {
    site,
    plans: (await planSummaries(member, [siteId])).get(siteId) ?? [],
    contacts: await listContacts(db(), member.organisationId, siteId),
    earthField: earthElementsAt(site, new Date()),
  };
}
