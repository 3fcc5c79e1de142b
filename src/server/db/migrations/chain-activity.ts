import type { Connection, RowDataPacket } from "mysql2/promise";
import { hashOfLine } from "../../activity/chain";

/**
 * Hashes the lines of activity logs that were written before the log was a chain: those of organisations whose head
 * still stands before the first line. A log that has been chained is never touched again.
 */
export async function chainOldActivity(owner: Connection): Promise<void> {
  const [unchained] = await owner.query<RowDataPacket[]>(
    "select organisation_id, hash from activity_heads where sequence = 0 and organisation_id in (select organisation_id from activity_log)",
  );
  for (const head of unchained) {
    await owner.beginTransaction();
    try {
      await chain(owner, String(head["organisation_id"]), String(head["hash"]));
      await owner.commit();
    } catch (error) {
      await owner.rollback();
      throw error;
    }
  }
}

async function chain(owner: Connection, organisationId: string, start: string): Promise<void> {
  const [lines] = await owner.query<RowDataPacket[]>(
    "select * from activity_log where organisation_id = ? order by sequence",
    [organisationId],
  );
  let previousHash = start;
  let sequence = 0;
  for (const line of lines) {
    sequence = Number(line["sequence"]);
    const hash = hashOfLine({
      organisationId,
      sequence,
      at: line["at"] as Date,
      actorId: line["actor_id"] as string | null,
      event: String(line["event"]),
      subjectKind: String(line["subject_kind"]),
      subjectId: line["subject_id"] as string | null,
      detail: String(line["detail"]),
      previousHash,
    });
    await owner.query("update activity_log set previous_hash = ?, hash = ? where id = ?", [
      previousHash,
      hash,
      line["id"],
    ]);
    previousHash = hash;
  }
  await owner.query("update activity_heads set sequence = ?, hash = ? where organisation_id = ?", [
    sequence,
    previousHash,
    organisationId,
  ]);
}
