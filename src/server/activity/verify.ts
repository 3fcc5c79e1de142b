import { db } from "../db/client";
import { findHead, linesAfter } from "../db/queries/activity";
import { ChainCheck } from "./chain";

const linesPerRead = 1000;

export interface Verification {
  lines: number;
  /** Hash of the newest line, as the log itself says. */
  head: string;
  /** What is not as it was written, in words; empty where the log is whole. */
  faults: readonly string[];
  /** The line whose hash is the one asked for; null where there is none. */
  wantedLine: number | null;
}

/**
 * Reads an organisation's whole log, as it stands at one moment, and computes every hash anew.
 * @param wantedHead a hash, or its beginning, that was printed or noted as the head at some time
 */
export async function verifyActivity(organisationId: string, wantedHead?: string): Promise<Verification> {
  const check = new ChainCheck();
  let wantedLine: number | null = null;
  return db().transaction(
    async (tx) => {
      const head = await findHead(tx, organisationId);
      for (let sequence = -1; ;) {
        const lines = await linesAfter(tx, organisationId, sequence, linesPerRead);
        for (const line of lines) {
          check.take(line);
          if (wantedHead !== undefined && line.hash.startsWith(wantedHead)) wantedLine = line.sequence;
        }
        if (lines.length < linesPerRead) break;
        sequence = lines.at(-1)?.sequence ?? sequence;
      }
      if (head === undefined) return { lines: 0, head: "", faults: ["the log has no head"], wantedLine };
      const lines = check.finish(head);
      return { lines, head: head.hash, faults: check.faults, wantedLine };
    },
    { isolationLevel: "repeatable read", accessMode: "read only" },
  );
}
