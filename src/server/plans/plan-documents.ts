import { z } from "zod";
import { planDocumentJson } from "~/domain/answers/plan-document-json";
import { type Fault, Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { MAX_DOCUMENT_BYTES } from "~/domain/plan-document/read";
import { recordActivity } from "../activity/record";
import { db, type Queryable } from "../db/client";
import { findDrawing } from "../db/queries/drawings";
import { findPlanDocument, replacePlanDocument } from "../db/queries/plan-documents";
import { type PlanRow, renamePlan as renamePlanRow } from "../db/queries/plans";
import { recordPlanEditor } from "../db/queries/revisions";
import { planNameInput, withFreePlanName } from "./plans";

/** Largest body of a save. */
export const documentMaxBytes = MAX_DOCUMENT_BYTES;

/** The document is judged by its own schema, whose faults have paths that begin in the document. */
export const saveInput = z.strictObject({ baseVersion: z.int().min(1), document: planDocumentJson });

export interface WorkingCopy {
  version: number;
  document: PlanDocument;
  savedAt: Date;
  savedByName: string | null;
}

const refuse = (faults: readonly Fault[]) =>
  new Refusal(
    "document.refused",
    "The plan cannot be saved as it is; each place that is at fault says what to change.",
    { faults },
  );

/** @throws Error where a plan has no document, which no transaction leaves behind */
export async function workingCopyOf(plan: Pick<PlanRow, "id" | "organisationId">): Promise<WorkingCopy> {
  const row = await findPlanDocument(db(), plan.organisationId, plan.id);
  if (row === undefined) throw new Error("A plan has no document.");
  return { ...row, document: JSON.parse(row.document) as PlanDocument };
}

/**
 * Saves a working copy that was made out of `baseVersion`. Saving what is stored already makes no new version, so a save
 * whose answer was lost may be repeated. The plan takes the document's name.
 * @throws Refusal document.refused with faults; document.conflict with the present working copy in its detail
 */
export async function saveDocument(
  member: Member,
  plan: PlanRow,
  { baseVersion, document: json }: z.output<typeof saveInput>,
): Promise<{ version: number; savedAt: Date }> {
  const document = judge(json);
  const text = JSON.stringify(document);
  const saved = await withFreePlanName(document.name, "document.refused", () =>
    db().transaction(async (tx) => {
      await refuseForeignDrawing(tx, plan, document);
      const present = await findPlanDocument(tx, plan.organisationId, plan.id);
      if (present?.document === text) return present;
      const savedAt = new Date();
      const next = { planId: plan.id, document: text, savedBy: member.userId, savedAt };
      if (!(await replacePlanDocument(tx, plan.organisationId, baseVersion, next))) return null;
      await noteEditor(tx, member, plan, baseVersion + 1, savedAt);
      if (document.name !== plan.name) await takeName(tx, member, plan, document.name);
      return { version: baseVersion + 1, savedAt };
    }),
  );
  if (saved === null) throw conflict(await workingCopyOf(plan));
  return { version: saved.version, savedAt: saved.savedAt };
}

/**
 * Renames a plan and its document, which gets a new version by it.
 * @throws Refusal input.refused where the name is taken; state.conflict where somebody saves at the same moment
 */
export async function renamePlan(member: Member, plan: PlanRow, name: string): Promise<{ version: number }> {
  const { version, document } = await workingCopyOf(plan);
  if (name === plan.name && name === document.name) return { version };
  await withFreePlanName(name, "input.refused", () =>
    db().transaction(async (tx) => {
      const next = {
        planId: plan.id,
        document: JSON.stringify({ ...document, name }),
        savedBy: member.userId,
        savedAt: new Date(),
      };
      if (!(await replacePlanDocument(tx, plan.organisationId, version, next)))
        throw new Refusal(
          "state.conflict",
          "The plan was saved by somebody while you renamed it. Try again.",
        );
      await noteEditor(tx, member, plan, version + 1, next.savedAt);
      await takeName(tx, member, plan, name);
    }),
  );
  return { version: version + 1 };
}

const noteEditor = (
  tx: Queryable,
  { userId }: Member,
  { organisationId, id }: PlanRow,
  lastVersion: number,
  lastEditedAt: Date,
): Promise<void> => recordPlanEditor(tx, { organisationId, planId: id, userId, lastVersion, lastEditedAt });

async function takeName(tx: Queryable, member: Member, plan: PlanRow, name: string): Promise<void> {
  const { organisationId } = plan;
  await renamePlanRow(tx, organisationId, plan.id, name);
  await recordActivity(tx, {
    organisationId,
    actorId: member.userId,
    event: "plan.renamed",
    subjectKind: "plan",
    subjectId: plan.id,
    detail: { from: plan.name, to: name },
  });
}

/** The valid document with its defaults filled in, under a name that a plan may have. @throws Refusal document.refused */
function judge(json: unknown): PlanDocument {
  const parsed = parsePlanDocument(json);
  if (!parsed.ok) throw refuse(parsed.faults);
  const named = planNameInput.safeParse({ name: parsed.document.name });
  if (!named.success) throw refuse(named.error.issues.map(({ message }) => ({ path: "name", message })));
  return { ...parsed.document, name: named.data.name };
}

/** @throws Refusal document.refused where the document refers to a drawing that is not one of the plan's */
async function refuseForeignDrawing(tx: Queryable, plan: PlanRow, document: PlanDocument): Promise<void> {
  const drawingId = document.drawing.sheet?.drawingId;
  if (drawingId === undefined) return;
  if (
    z.uuid().safeParse(drawingId).success &&
    (await findDrawing(tx, plan.organisationId, plan.id, drawingId)) !== undefined
  )
    return;
  throw refuse([
    {
      path: "drawing.sheet.drawingId",
      message: "This drawing does not belong to the plan. Upload it to this plan first.",
    },
  ]);
}

const conflict = (present: WorkingCopy) =>
  new Refusal(
    "document.conflict",
    `${present.savedByName ?? "Somebody"} saved this plan after you opened it. Your changes are kept here: compare, and choose what stands.`,
    { detail: { ...present } },
  );
