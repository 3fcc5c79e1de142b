import { describe, expect, it } from "vitest";
import { ChainCheck, chainStart, hashOfLine, type StoredLine } from "./chain";

function chainOf(count: number): StoredLine[] {
  const lines: StoredLine[] = [];
  for (let sequence = 1; sequence <= count; sequence += 1) {
    const fields = {
      organisationId: "a0000000-0000-4000-8000-000000000001",
      sequence,
      at: new Date(Date.UTC(2026, 0, 1, 0, 0, sequence)),
      actorId: null,
      event: "site.changed",
      subjectKind: "site",
      subjectId: null,
      detail: `{"to":${String(sequence)}}`,
      previousHash: lines.at(-1)?.hash ?? chainStart,
    };
    lines.push({ ...fields, id: `line-${String(sequence)}`, hash: hashOfLine(fields) });
  }
  return lines;
}

const headOf = (lines: readonly StoredLine[]) => {
  const last = lines.at(-1);
  return { sequence: last?.sequence ?? 0, hash: last?.hash ?? chainStart };
};

function faultsOf(lines: readonly StoredLine[], head: { sequence: number; hash: string }): string[] {
  const check = new ChainCheck();
  for (const line of lines) check.take(line);
  check.finish(head);
  return check.faults;
}

describe("the chain of the activity log", () => {
  it("hashes the canonical JSON of a line", () => {
    const [line] = chainOf(1);
    // SHA-256 computed apart from this program, with sha256sum over the text that RFC 8785 prescribes.
    expect(line?.hash).toBe("cdd1ef01567ab2321500b1fbb5221cbe172ba22fc6faed71397802fa2a60d706");
  });

  it("is whole as it was written, with no line too", () => {
    const lines = chainOf(5);
    expect(faultsOf(lines, headOf(lines))).toEqual([]);
    expect(faultsOf([], headOf([]))).toEqual([]);
  });

  const changes: [string, Partial<StoredLine>][] = [
    ["time", { at: new Date(0) }],
    ["actor", { actorId: "a0000000-0000-4000-8000-000000000002" }],
    ["event", { event: "site.created" }],
    ["kind of subject", { subjectKind: "plan" }],
    ["subject", { subjectId: "a0000000-0000-4000-8000-000000000003" }],
    ["detail", { detail: '{"to": 3}' }],
    ["organisation", { organisationId: "a0000000-0000-4000-8000-000000000009" }],
  ];
  it.each(changes)("names the line whose %s was changed", (_, change) => {
    const lines = chainOf(5);
    const changed = lines.map((line) => (line.sequence === 3 ? { ...line, ...change } : line));
    expect(faultsOf(changed, headOf(lines))).toEqual([expect.stringMatching(/^line 3 .*was changed/)]);
  });

  it("names the line after one that was changed together with its hash", () => {
    const lines = chainOf(5);
    const changed = lines.map((line) => {
      if (line.sequence !== 3) return line;
      const fields = { ...line, detail: "{}" };
      return { ...fields, hash: hashOfLine(fields) };
    });
    expect(faultsOf(changed, headOf(lines))).toEqual([expect.stringMatching(/^line 4 .*does not follow/)]);
  });

  it("names lines that were removed, at the beginning, in the middle and at the end", () => {
    const lines = chainOf(6);
    const without = (...gone: number[]) =>
      faultsOf(
        lines.filter(({ sequence }) => !gone.includes(sequence)),
        headOf(lines),
      );
    expect(without(1)).toEqual(["line 1 is missing"]);
    expect(without(3, 4)).toEqual(["lines 3 to 4 are missing"]);
    expect(without(5, 6)).toEqual(["lines 5 to 6 are missing"]);
  });

  it("names lines that were exchanged", () => {
    const lines = chainOf(5);
    const exchanged = lines.map((line) => ({
      ...line,
      ...(line.sequence === 2 && { detail: '{"to":3}', hash: lines[2]?.hash ?? "" }),
      ...(line.sequence === 3 && { detail: '{"to":2}', hash: lines[1]?.hash ?? "" }),
    }));
    const faults = faultsOf(exchanged, headOf(lines)).join("\n");
    expect(faults).toMatch(/line 2 .*was changed/);
    expect(faults).toMatch(/line 3 .*was changed/);
  });

  it("names a head that was put back to hide what was cut off, and one that is behind", () => {
    const lines = chainOf(5);
    const cut = lines.slice(0, 4);
    expect(faultsOf(cut, { sequence: 4, hash: headOf(lines).hash })).toEqual([
      expect.stringContaining("the head does not hold the hash of line 4"),
    ]);
    expect(faultsOf(lines, headOf(cut))).toEqual([expect.stringContaining("goes on to line 5")]);
  });
});
