import { Refusal } from "~/domain/errors";
import type { Member } from "~/domain/permissions";
import { revisionLetters, revisionStateWords } from "~/domain/revision";
import type { Queryable } from "../db/client";
import {
  findRevisionContents,
  listRevisionEditors,
  lockRevision,
  type RevisionContents,
  type RevisionRow,
} from "../db/queries/revisions";

export const revisionPage = ({ planId, id }: Pick<RevisionRow, "planId" | "id">): string =>
  `/plans/${planId}/revisions/${id}`;

/** The revision as it now is, held until the transaction ends. @throws Refusal state.conflict once it is closed */
export async function lockUnderReview(tx: Queryable, revision: RevisionRow): Promise<RevisionRow> {
  const present = await lockRevision(tx, revision.organisationId, revision.id);
  if (present?.state === "under-review") return present;
  throw new Refusal(
    "state.conflict",
    `Revision ${revisionLetters(revision.ordinal)} is ${present === undefined ? "no longer there" : revisionStateWords[present.state]} and takes no more decisions. Reload the page.`,
  );
}

/** @throws Error where a revision has no contents, which no transaction leaves behind */
export async function contentsOf(
  db: Queryable,
  { organisationId, id }: Pick<RevisionRow, "organisationId" | "id">,
): Promise<RevisionContents> {
  const contents = await findRevisionContents(db, organisationId, id);
  if (contents === undefined) throw new Error("A revision has no contents.");
  return contents;
}

/** Whether the revision holds an edit of the member's, or was submitted by them. */
export const isOwnWork = (
  userId: string,
  revision: Pick<RevisionRow, "submittedBy">,
  editors: readonly { userId: string }[],
): boolean => revision.submittedBy === userId || editors.some((editor) => editor.userId === userId);

/** Four eyes: nobody decides on or releases what they drew or submitted. @throws Refusal permission.own-edit */
export async function requireOtherEyes(tx: Queryable, member: Member, revision: RevisionRow): Promise<void> {
  const editors = await listRevisionEditors(tx, [revision.id]);
  if (!isOwnWork(member.userId, revision, editors)) return;
  throw new Refusal(
    "permission.own-edit",
    `Revision ${revisionLetters(revision.ordinal)} holds an edit of yours since the last release, or you submitted it. Another auditor has to decide on it.`,
  );
}
