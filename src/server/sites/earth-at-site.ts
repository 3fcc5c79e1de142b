import type { EarthField } from "~/domain/plan-document/earth-field";
import { emptyPlanDocument } from "~/domain/plan-document/plan-document";
import { resolveDefaults } from "~/domain/plan-document/resolved";
import type { EarthElements } from "~/domain/screening-result";
import { planEarth } from "~/screening/earth";
import { RefusedDocumentError } from "~/screening/refusal";
import type { SiteRow } from "../db/queries/sites";

type Place = Pick<SiteRow, "latitudeDeg" | "longitudeDeg" | "altitudeM" | "timeZone">;

/** The calendar day at the site. */
function dayAt(timeZone: string, now: Date): string {
  // The Swedish form of a date is ISO 8601's.
  return new Intl.DateTimeFormat("sv-SE", { timeZone, dateStyle: "short" }).format(now);
}

/** The Earth's field of that day by the model; null where nobody has stated where on earth the site is. */
export function earthFieldAt(site: Place, now: Date): Extract<EarthField, { mode: "model" }> | null {
  const { latitudeDeg, longitudeDeg, altitudeM, timeZone } = site;
  if (latitudeDeg === null || longitudeDeg === null) return null;
  return { mode: "model", latitudeDeg, longitudeDeg, altitudeM: altitudeM ?? 0, date: dayAt(timeZone, now) };
}

/** The geomagnetic elements of that day at the site; null without a place, or outside the years of the model on board. */
export function earthElementsAt(site: Place, now: Date): EarthElements | null {
  const document = { ...emptyPlanDocument(""), earthField: earthFieldAt(site, now) };
  try {
    return planEarth(resolveDefaults(document))?.elements ?? null;
  } catch (error) {
    // A site's page is worth showing without its elements; a screening there is refused with the reason.
    if (error instanceof RefusedDocumentError) return null;
    throw error;
  }
}
