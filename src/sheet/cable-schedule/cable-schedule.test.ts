import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument } from "~/domain/plan-document/plan-document";
import { addScheduledCircuits, knownTags } from "./add-circuits";
import { findColumns } from "./columns";
import { readSchedule } from "./read-schedule";
import { decodeText, guessDelimiter, readTable } from "./read-table";
import { readNumber } from "../read-number";
import { readCores, readLoad, readSizeMm2 } from "./values";

const read = (text: string, knownTags: string[] = []) => {
  const rows = readTable(text, guessDelimiter(text));
  const { mapping, headingRows } = findColumns(rows);
  return readSchedule(rows.slice(headingRows), mapping, knownTags);
};

describe("the bytes of a file", () => {
  it("reads UTF-8 with and without its mark, UTF-16 and Windows-1252", () => {
    const text = "tag;size\nK–1;2,5 mm²";
    expect(decodeText(new TextEncoder().encode(`\ufeff${text}`))).toBe(text);
    expect(decodeText(new TextEncoder().encode(text))).toBe(text);
    const utf16 = Uint8Array.from([0xff, 0xfe, ...[..."tag"].flatMap((c) => [c.charCodeAt(0), 0])]);
    expect(decodeText(utf16)).toBe("tag");
    expect(decodeText(Uint8Array.from([0x6d, 0x6d, 0xb2, 0x96]))).toBe("mm²–");
  });
});

describe("the table", () => {
  it("tells a paste from a CSV file with semicolons or commas", () => {
    expect(guessDelimiter("Tag\tFrom, to\n")).toBe("\t");
    expect(guessDelimiter("\r\nTag;Load\n1;2,5")).toBe(";");
    expect(guessDelimiter('"Tag; number",From\n')).toBe(",");
  });

  it("keeps quoted separators and line ends, and names lines as the input counts them", () => {
    const rows = readTable('tag,from\n\n"a\nb","x, y"\nc,d\n', ",");
    expect(rows.map((row) => row.cells)).toEqual([
      ["tag", "from"],
      ["a\nb", "x, y"],
      ["c", "d"],
    ]);
    expect(rows.map((row) => row.line)).toEqual([1, 4, 5]);
  });

  it("finds headings below a title, in any order and wording", () => {
    const rows = readTable(
      "Schedule 7\nDesign current [A];Cable No.;CSA (mm²);No. of cores\n12,5;K1;4;2\n",
      ";",
    );
    expect(findColumns(rows)).toEqual({
      mapping: { tag: 1, from: null, to: null, cores: 3, size: 2, load: 0 },
      headingRows: 2,
    });
  });

  it("takes the columns in order where no headings are", () => {
    expect(findColumns(readTable("K1\tMDB\tUPS\t3", "\t"))).toEqual({
      mapping: { tag: 0, from: 1, to: 2, cores: 3, size: null, load: null },
      headingRows: 0,
    });
  });
});

describe("values", () => {
  it("reads numbers with point or comma", () => {
    fc.assert(
      fc.property(fc.integer({ min: -1_000_000, max: 1_000_000 }), (hundredths) => {
        const text = (hundredths / 100).toFixed(2);
        expect(readNumber(text)).toBe(Number(text));
        expect(readNumber(text.replace(".", ","))).toBe(Number(text));
      }),
    );
    expect(readNumber("1.250,5")).toBe(1250.5);
    expect(readNumber("1,250.5")).toBe(1250.5);
    expect(readNumber("12 V")).toBeNull();
    expect(readNumber("")).toBeNull();
  });

  it("reads cores, sizes and loads as schedules write them", () => {
    expect(readCores("4C")).toEqual({ ok: true, value: { live: 3, neutral: true } });
    expect(readCores("3 + N + PE")).toEqual({ ok: true, value: { live: 3, neutral: true } });
    expect(readCores("3c+E")).toEqual({ ok: true, value: { live: 3, neutral: false } });
    expect(readCores("12").ok).toBe(false);
    expect(readSizeMm2("3x95 mm²")).toEqual({ ok: true, value: 95 });
    expect(readSizeMm2("2,5")).toEqual({ ok: true, value: 2.5 });
    expect(readSizeMm2("AWG 4").ok).toBe(false);
    expect(readLoad("0,4 kA")).toEqual({ ok: true, value: { currentA: 400, kind: null } });
    expect(readLoad("32 A DC")).toEqual({ ok: true, value: { currentA: 32, kind: "dc" } });
    expect(readLoad("tbc")).toEqual({ ok: true, value: null });
    expect(readLoad("15 kW")).toEqual({
      ok: false,
      problem: "load “15 kW” is a power; enter the current in amperes",
    });
  });
});

describe("the schedule", () => {
  it("lets one bad row spoil no other and says what is wrong with it", () => {
    const rows = read(
      "Tag;From;To;Cores;Size;Load\nK1;MDB;UPS;3;95;120,5\n;MDB;X;3;95;1\nk1;A;B;2;4;9\nK3;A;B;2;4;\n",
    );
    expect(rows.map((row) => row.problems)).toEqual([
      [],
      ["no tag"],
      ["tag “k1” stands on line 2 already"],
      [],
    ]);
    expect(rows[0]?.cable).toEqual({
      tag: "K1",
      from: "MDB",
      to: "UPS",
      cores: { live: 3, neutral: false },
      sizeMm2: 95,
      load: { currentA: 120.5, kind: null },
    });
    expect(rows[3]?.cable?.load).toBeNull();
  });

  it("names circuits that the plan has already", () => {
    const [row] = read("Tag\tLoad\nK1\t3", ["k1"]);
    expect(row).toMatchObject({ known: true, cable: null });
  });
});

describe("circuits from the schedule", () => {
  const planned = (text: string) =>
    addScheduledCircuits(emptyPlanDocument("Hall"), read(text), { twoCoreKind: "dc", frequencyHz: 50 });

  it("wait to be traced, with arrangement by cores, radius by size and supply by load", () => {
    const document = planned(
      "Tag;From;To;Cores;Size;Load\nK1;MDB;UPS;3;95;120\nK2;A;B;2;;\nK3;C;D;1;4;9 A AC\nbad;;;x;;",
    );
    expect(parsePlanDocument(JSON.parse(JSON.stringify(document)))).toMatchObject({ ok: true });
    expect(document.circuits).toMatchObject([
      {
        name: "K1: MDB to UPS",
        path: null,
        route: null,
        arrangement: { kind: "trefoil" },
        conductorRadiusM: 0.0057,
        supply: { kind: "ac3", currentA: 120, frequencyHz: 50 },
        currentBasis: "load-list",
      },
      { name: "K2: A to B", arrangement: { kind: "pair" }, supply: null },
      { name: "K3: C to D", arrangement: { kind: "single" }, supply: { kind: "ac1", currentA: 9 } },
    ]);
    expect(document.drawing.schedule?.map(({ tag, circuitId }) => [tag, circuitId])).toEqual(
      document.circuits.map(({ id }, i) => [`K${i + 1}`, id]),
    );
  });

  it("are known by their tags when the schedule is read again", () => {
    const document = planned("Tag;Load\nK1;3\nK2;4");
    expect(knownTags(document)).toEqual(["K1", "K2"]);
  });
});
