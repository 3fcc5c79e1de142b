import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { recordActivity } from "../activity/record";
import { db } from "../db/client";
import { archivePlanRow, listArchivedPlans } from "../db/queries/plans";
import { archiveSiteRow, listArchivedSites } from "../db/queries/sites";

/** Typed to show that the right thing is meant. */
export const archiveInput = z.object({ name: z.string() });

interface Named {
  id: string;
  name: string;
}

const writers = { site: archiveSiteRow, plan: archivePlanRow };

/**
 * Puts a site with its plans, or one plan, out of sight of everybody; nothing is deleted and `restore` brings it back.
 * @throws Refusal input.refused where `typedName` is not its name, state.conflict
 */
export async function archive(
  actor: Member,
  kind: keyof typeof writers,
  target: Named,
  typedName: string,
): Promise<void> {
  if (typedName.trim() !== target.name) {
    const message = `Type the name exactly as it stands: ${target.name}`;
    throw new Refusal("input.refused", message, { faults: [{ path: "name", message }] });
  }
  await write(actor, kind, target, new Date());
}

/** @throws Refusal state.conflict */
export const restore = (actor: Member, kind: keyof typeof writers, target: Named): Promise<void> =>
  write(actor, kind, target, null);

async function write(
  { organisationId, userId }: Member,
  kind: keyof typeof writers,
  { id, name }: Named,
  archivedAt: Date | null,
): Promise<void> {
  await db().transaction(async (tx) => {
    if (!(await writers[kind](tx, organisationId, id, archivedAt)))
      throw new Refusal("state.conflict", `Somebody else has done this meanwhile. Reload the page to see.`);
    await recordActivity(tx, {
      organisationId,
      actorId: userId,
      event: `${kind}.${archivedAt === null ? "restored" : "archived"}`,
      subjectKind: kind,
      subjectId: id,
      detail: { name },
    });
  });
}

/** What was put away, the last first. */
export async function archivedOf({ organisationId }: Member) {
  return {
    sites: await listArchivedSites(db(), organisationId),
    plans: await listArchivedPlans(db(), organisationId),
  };
}
