import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { emptyPlanDocument } from "~/domain/plan-document/plan-document";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { isDuplicateEntry } from "../db/duplicate-entry";
import { insertPlanDocument } from "../db/queries/plan-documents";
import { insertPlan } from "../db/queries/plans";
import { recordPlanEditor } from "../db/queries/revisions";
import type { SiteRow } from "../db/queries/sites";
import { earthFieldAt } from "../sites/earth-at-site";

export const planNameMaxLength = 200;

export const planNameInput = z.strictObject({
  name: z
    .string()
    .trim()
    .min(1, "Give the plan a name, such as Level 1, instrument hall.")
    .max(planNameMaxLength, `Keep the plan's name to ${String(planNameMaxLength)} characters.`)
    .regex(/^[^\p{Cc}]*$/u, "Take line breaks and control characters out of the plan's name."),
});

/** Runs `write`, and answers a name that another plan of the site has. @throws Refusal with `code` */
export async function withFreePlanName<T>(
  name: string,
  code: "input.refused" | "document.refused",
  write: () => Promise<T>,
): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (!isDuplicateEntry(error, "plans_name")) throw error;
    const message = `This site already has a plan called ${name}. Choose another name.`;
    throw new Refusal(code, message, { faults: [{ path: "name", message }], cause: error });
  }
}

/**
 * Adds a plan with the first version of its document, which takes the Earth's field of today from the site's place.
 * @throws Refusal input.refused where the name is taken
 */
export async function createPlan(
  member: Member,
  site: SiteRow,
  name: string,
): Promise<{ id: string; url: string }> {
  const id = crypto.randomUUID();
  const now = new Date();
  const { organisationId, userId } = member;
  const document = { ...emptyPlanDocument(name), earthField: earthFieldAt(site, now) };
  await withFreePlanName(name, "input.refused", () =>
    db().transaction(async (tx) => {
      await insertPlan(tx, {
        id,
        organisationId,
        siteId: site.id,
        name,
        createdBy: userId,
        createdAt: now,
        archivedAt: null,
      });
      await insertPlanDocument(tx, {
        planId: id,
        document: JSON.stringify(document),
        savedBy: userId,
        savedAt: now,
      });
      await recordPlanEditor(tx, { organisationId, planId: id, userId, lastVersion: 1, lastEditedAt: now });
      await recordActivity(tx, {
        organisationId,
        actorId: userId,
        event: "plan.created",
        subjectKind: "plan",
        subjectId: id,
        detail: { siteId: site.id, name },
      });
    }),
  );
  return { id, url: `/plans/${id}` };
}
