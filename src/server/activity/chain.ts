import { canonicalJson } from "~/screening/canonical-json";
import { hashOf } from "../auth/secrets";

/** What stands before the first line. */
export const chainStart = "0".repeat(64);

/** A line of the log as its hash covers it; everything that is stored but its id. */
export interface ChainedFields {
  organisationId: string;
  sequence: number;
  at: Date;
  actorId: string | null;
  event: string;
  subjectKind: string;
  subjectId: string | null;
  /** JSON, to the byte. */
  detail: string;
  previousHash: string;
}

/** SHA-256 in lower-case hexadecimal over the canonical JSON (RFC 8785) of a line's fields; the time as ISO 8601 in UTC. */
export function hashOfLine(line: ChainedFields): string {
  const { organisationId, sequence, at, actorId, event, subjectKind, subjectId, detail, previousHash } = line;
  return hashOf(
    canonicalJson({
      organisationId,
      sequence,
      at: at.toISOString(),
      actorId,
      event,
      subjectKind,
      subjectId,
      detail,
      previousHash,
    }),
  );
}

export interface ChainHead {
  /** Of the newest line; 0 where there is none. */
  sequence: number;
  hash: string;
}

export interface StoredLine extends ChainedFields {
  id: string;
  hash: string;
}

/** Reads one organisation's lines by their sequence and says which of them are not as they were written. */
export class ChainCheck {
  readonly faults: string[] = [];
  #last: ChainHead = { sequence: 0, hash: chainStart };
  #count = 0;

  /** The next line in the order of the sequence. */
  take(line: StoredLine): void {
    const { sequence } = line;
    const expected = this.#last.sequence + 1;
    const name = `line ${String(sequence)} (${line.id}, ${line.event}, ${line.at.toISOString()})`;
    if (sequence > expected) this.#missing(expected, sequence - 1);
    else if (sequence < expected) this.faults.push(`${name} stands where line ${String(expected)} belongs`);
    else if (line.previousHash !== this.#last.hash)
      this.faults.push(`${name} does not follow the line before it: one of the two was changed or exchanged`);
    if (hashOfLine(line) !== line.hash)
      this.faults.push(`${name} was changed: its hash is not that of its fields`);
    this.#last = { sequence: Math.max(sequence, this.#last.sequence), hash: line.hash };
    this.#count += 1;
  }

  /** After the last line. @returns how many lines there were */
  finish(head: ChainHead): number {
    const { sequence, hash } = this.#last;
    if (head.sequence > sequence) this.#missing(sequence + 1, head.sequence);
    else if (head.sequence < sequence)
      this.faults.push(
        `the head stands at line ${String(head.sequence)}, but the log goes on to line ${String(sequence)}`,
      );
    else if (head.hash !== hash)
      this.faults.push(`the head does not hold the hash of line ${String(sequence)}, the newest`);
    return this.#count;
  }

  #missing(from: number, to: number): void {
    this.faults.push(
      from === to ? `line ${String(from)} is missing` : `lines ${String(from)} to ${String(to)} are missing`,
    );
  }
}
