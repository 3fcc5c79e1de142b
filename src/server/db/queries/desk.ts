import { and, asc, countDistinct, eq, inArray, isNull, ne, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { findings, planDocuments, plans, screenings } from "../schema/plans";

/**
 * The plans of some sites by name, each with its latest screening: verdict, when, and how many of its sensors are
 * undecided or over. Null where a plan has never been screened.
 */
export async function listPlansWithVerdicts(
  db: Queryable,
  organisationId: string,
  siteIds: readonly string[],
) {
  if (siteIds.length === 0) return [];
  const ranked = db
    .select({
      id: screenings.id,
      planId: screenings.planId,
      documentVersion: screenings.documentVersion,
      verdict: screenings.verdict,
      screenedAt: screenings.screenedAt,
      age: sql<number>`row_number() over (partition by ${screenings.planId} order by ${screenings.screenedAt} desc, ${screenings.id} desc)`.as(
        "age",
      ),
    })
    .from(screenings)
    .innerJoin(plans, eq(plans.id, screenings.planId))
    .where(and(eq(plans.organisationId, organisationId), inArray(plans.siteId, [...siteIds])))
    .as("ranked");
  return db
    .select({
      id: plans.id,
      siteId: plans.siteId,
      name: plans.name,
      lastSavedAt: planDocuments.savedAt,
      documentVersion: planDocuments.version,
      screeningId: ranked.id,
      screenedVersion: ranked.documentVersion,
      verdict: ranked.verdict,
      screenedAt: ranked.screenedAt,
      flaggedCount: countDistinct(findings.sensorId),
    })
    .from(plans)
    .innerJoin(planDocuments, eq(planDocuments.planId, plans.id))
    .leftJoin(ranked, and(eq(ranked.planId, plans.id), eq(ranked.age, 1)))
    .leftJoin(findings, and(eq(findings.screeningId, ranked.id), ne(findings.verdict, "within")))
    .where(
      and(
        eq(plans.organisationId, organisationId),
        inArray(plans.siteId, [...siteIds]),
        isNull(plans.archivedAt),
      ),
    )
    .groupBy(
      plans.id,
      plans.siteId,
      plans.name,
      planDocuments.savedAt,
      planDocuments.version,
      ranked.id,
      ranked.documentVersion,
      ranked.verdict,
      ranked.screenedAt,
    )
    .orderBy(asc(plans.name));
}
