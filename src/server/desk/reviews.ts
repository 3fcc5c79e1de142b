import { type Disposition, dispositionOf } from "~/domain/decision";
import { type Member, mayAct } from "~/domain/permissions";
import { revisionLetters } from "~/domain/revision";
import { db } from "../db/client";
import { listDecisions } from "../db/queries/decisions";
import { listLatestRevisions, listRevisionEditors, listRevisionPositions } from "../db/queries/revisions";
import { isOwnWork } from "../revisions/open-revision";

type Row = Awaited<ReturnType<typeof listLatestRevisions>>[number];

export interface WaitingReview extends Row {
  letters: string;
  flagged: number;
  /** Flagged positions without a decision. */
  waiting: number;
  /** Whether somebody else has to review it, because of an edit of the member's. */
  isOwn: boolean;
}

/** Revisions under review for auditors, the longest waiting first; empty for everybody else. */
export async function reviewsFor(member: Member): Promise<WaitingReview[]> {
  if (!mayAct(member, "revision.decide")) return [];
  const rows = await listLatestRevisions(db(), member.organisationId, ["under-review"]);
  const ids = rows.map(({ id }) => id);
  const positions = await listRevisionPositions(db(), ids);
  const editors = await listRevisionEditors(db(), ids);
  return Promise.all(
    rows.map(async (row) => {
      const decided = new Map(
        (await listDecisions(db(), row.id)).map((decision) => [decision.sensorId, decision]),
      );
      const dispositions = positions
        .filter(({ revisionId }) => revisionId === row.id)
        .map(({ verdict, sensorId }): Disposition => dispositionOf(verdict, decided.get(sensorId)));
      return {
        ...row,
        letters: revisionLetters(row.ordinal),
        flagged: dispositions.filter((one) => one !== "released").length,
        waiting: dispositions.filter((one) => one === "waiting").length,
        isOwn: isOwnWork(
          member.userId,
          row,
          editors.filter(({ revisionId }) => revisionId === row.id),
        ),
      };
    }),
  );
}

/** Plans whose latest revision was returned, for whoever may submit the next one. */
export async function returnedFor(member: Member): Promise<(Row & { letters: string })[]> {
  if (!mayAct(member, "revision.submit")) return [];
  const rows = await listLatestRevisions(db(), member.organisationId, ["returned"]);
  return rows.map((row) => ({ ...row, letters: revisionLetters(row.ordinal) }));
}
