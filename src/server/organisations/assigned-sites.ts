import { Refusal } from "~/domain/errors";
import type { Queryable } from "../db/client";
import { listSites } from "../db/queries/sites";

/** `siteIds` once each, if all are sites of the organisation. @throws Refusal input.refused */
export async function sitesOfOrganisation(
  db: Queryable,
  organisationId: string,
  siteIds: readonly string[],
): Promise<string[]> {
  const wanted = [...new Set(siteIds)];
  const there = await listSites(db, organisationId, wanted);
  if (there.length === wanted.length) return wanted;
  const message = "One of the sites is not there any more. Reload the page and choose again.";
  throw new Refusal("input.refused", message, { faults: [{ path: "siteIds", message }] });
}
