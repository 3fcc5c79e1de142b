import type { Member } from "~/domain/permissions";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { positionsCsv, positionsCsvName } from "~/domain/positions-csv";
import { releaseSentence, revisionLetters } from "~/domain/revision";
import type { ScreeningResult } from "~/domain/screening-result";
import { db } from "../db/client";
import { listEarlierDecisions } from "../db/queries/decisions";
import { findPlanDocument } from "../db/queries/plan-documents";
import type { PlanRow } from "../db/queries/plans";
import {
  listRevisionComments,
  listRevisionEditors,
  listRevisions,
  type RevisionRow,
} from "../db/queries/revisions";
import type { SiteRow } from "../db/queries/sites";
import { contentsOf, isOwnWork } from "./open-revision";
import { decidedPositions } from "./positions";

const withLetters = <T extends { ordinal: number }>(row: T) => ({
  ...row,
  letters: revisionLetters(row.ordinal),
});

/** A plan's revisions, the newest first, and where its working copy is. */
export async function planRevisions(plan: Pick<PlanRow, "id" | "organisationId">) {
  const rows = await listRevisions(db(), plan.organisationId, plan.id);
  const saved = await findPlanDocument(db(), plan.organisationId, plan.id);
  if (saved === undefined) throw new Error("A plan has no document.");
  return {
    revisions: rows.map(withLetters),
    underReview: rows.find(({ state }) => state === "under-review"),
    workingVersion: saved.version,
    hasPosition: (JSON.parse(saved.document) as PlanDocument).sensors.length > 0,
  };
}

/** A revision with all that its page shows to `member`. */
export async function revisionView(member: Member, plan: PlanRow, site: SiteRow, revision: RevisionRow) {
  const { organisationId, id } = revision;
  const contents = await contentsOf(db(), revision);
  const listed = await planRevisions(plan);
  const heading = listed.revisions.find((one) => one.id === id);
  if (heading === undefined) throw new Error("A revision is not among its plan's.");
  const positions = await decidedPositions(db(), id);
  const editors = await listRevisionEditors(db(), [id]);
  const waiting = positions.filter(({ disposition }) => disposition === "waiting").length;
  const document = JSON.parse(contents.document) as PlanDocument;
  return {
    heading,
    contents: { ...contents, document, result: JSON.parse(contents.result) as ScreeningResult },
    positions,
    waiting,
    editors,
    isOwn: isOwnWork(member.userId, revision, editors),
    comments: await listRevisionComments(db(), id),
    earlier: await listEarlierDecisions(db(), organisationId, plan.id, revision.ordinal),
    others: listed.revisions.filter((one) => one.id !== id),
    workingVersion: listed.workingVersion,
    sentence: releaseSentence({
      ordinal: revision.ordinal,
      planName: plan.name,
      siteName: site.name,
      dispositions: positions.map(({ disposition }) => disposition),
    }),
  };
}

/** A revision as the API answers it. */
export async function revisionState(plan: PlanRow, revision: RevisionRow) {
  const contents = await contentsOf(db(), revision);
  const { revisions } = await planRevisions(plan);
  const row = revisions.find(({ id }) => id === revision.id);
  if (row === undefined) throw new Error("A revision is not among its plan's.");
  const positions = await decidedPositions(db(), revision.id);
  return {
    ...headingOf(row),
    returnReasons: row.returnReasons,
    signedSentence: row.signedSentence,
    signedName: row.signedName,
    hashes: {
      documentSha256: contents.documentSha256,
      drawingSha256: contents.drawingSha256,
      resultSha256: contents.resultSha256,
      sealSha256: contents.sealSha256,
      inputHash: contents.inputHash,
    },
    positions: positions.map(({ decision, replaced: _replaced, ...position }) => ({
      ...position,
      reason: decision?.reason ?? null,
      expiresOn: decision?.expiresOn ?? null,
      moveTo: decision?.moveTo ?? null,
      decidedAt: decision?.decidedAt ?? null,
    })),
  };
}

type Listed = Awaited<ReturnType<typeof planRevisions>>["revisions"][number];

export const headingOf = (row: Listed) => ({
  id: row.id,
  letters: row.letters,
  state: row.state,
  note: row.note,
  verdict: row.verdict,
  engineVersion: row.engineVersion,
  submittedAt: row.submittedAt,
  submittedByName: row.submittedByName,
  closedAt: row.closedAt,
  closedByName: row.closedByName,
});

/** What the revision froze, to the byte. */
export async function frozenText(revision: RevisionRow, part: "document" | "result"): Promise<string> {
  return (await contentsOf(db(), revision))[part];
}

export async function revisionCsv(revision: RevisionRow): Promise<{ fileName: string; text: string }> {
  const contents = await contentsOf(db(), revision);
  const document = JSON.parse(contents.document) as PlanDocument;
  const result = JSON.parse(contents.result) as ScreeningResult;
  return {
    fileName: positionsCsvName(`${document.name} ${revisionLetters(revision.ordinal)}`),
    text: positionsCsv(document, result),
  };
}
