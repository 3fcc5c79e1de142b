import { type Disposition, dispositionOf } from "~/domain/decision";
import type { Queryable } from "../db/client";
import { listDecisions } from "../db/queries/decisions";
import { listRevisionPositions } from "../db/queries/revisions";

type Decision = Awaited<ReturnType<typeof listDecisions>>[number];

/** What holds for a position of a revision now. */
export interface DecidedPosition {
  sensorId: string;
  sensorName: string;
  verdict: Awaited<ReturnType<typeof listRevisionPositions>>[number]["verdict"];
  budgetUsed: number;
  disposition: Disposition;
  /** The decision that stands. */
  decision: Decision | undefined;
  /** Those that it replaced, the newest first. */
  replaced: readonly Decision[];
}

export async function decidedPositions(db: Queryable, revisionId: string): Promise<DecidedPosition[]> {
  const positions = await listRevisionPositions(db, [revisionId]);
  const bySensor = new Map<string, Decision[]>();
  for (const decision of await listDecisions(db, revisionId))
    bySensor.set(decision.sensorId, [...(bySensor.get(decision.sensorId) ?? []), decision]);
  return positions.map(({ sensorId, sensorName, verdict, budgetUsed }) => {
    const [decision, ...replaced] = bySensor.get(sensorId) ?? [];
    const disposition = dispositionOf(verdict, decision);
    return { sensorId, sensorName, verdict, budgetUsed, disposition, decision, replaced };
  });
}
