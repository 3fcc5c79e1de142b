import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { byteOrderMark, csvText, defused } from "./csv";

/** Text that leans towards what spreadsheets and parsers stumble over. */
const awkward = fc.array(
  fc.oneof(fc.constantFrom(..."=+-@\t\r\n,;\"'＝ 0123456789eE.".split("")), fc.string({ unit: "grapheme" })),
  { maxLength: 12 },
);
const awkwardText = awkward.map((parts) => parts.join(""));

const isNumber = (text: string) => text.trim() !== "" && Number.isFinite(Number(text));

describe("csvText", () => {
  it("gives back every cell through an RFC 4180 reader, but for the apostrophe of defused ones", () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(awkwardText, { minLength: 2, maxLength: 4 }), { minLength: 1 }),
        (rows) => {
          const width = rows[0]?.length ?? 0;
          const table = rows.map((row) => Array.from({ length: width }, (_, column) => row[column] ?? ""));
          const read: string[][] = parse(csvText(table), { record_delimiter: "\r\n" });
          expect(read).toEqual(table.map((row) => row.map(defused)));
        },
      ),
    );
  });

  it("leaves no cell that a spreadsheet would compute unless it is a number", () => {
    fc.assert(
      fc.property(awkwardText, (text) => {
        const [row]: string[][] = parse(csvText([[text, "end"]]), { record_delimiter: "\r\n" });
        const cell = row?.[0] ?? "";
        if (/^[=+\-@\t\r]/.test(cell)) expect(isNumber(cell)).toBe(true);
        expect(cell.endsWith(text)).toBe(true);
      }),
    );
  });

  it("defuses formulas and keeps numbers", () => {
    expect(csvText([["=1+1", "+49 30", "-2.5e-3", "-x", "@sum", -2.5, null, "+12"]])).toBe(
      "'=1+1,'+49 30,-2.5e-3,'-x,'@sum,-2.5,,+12\r\n",
    );
    expect(csvText([["\t=1", '=HYPERLINK("x")']])).toBe(`"'\t=1","'=HYPERLINK(""x"")"\r\n`);
  });

  it("is read as text by a reader that strips the byte order mark", () => {
    const [row]: string[][] = parse(byteOrderMark + csvText([["Prüfplatz"]]), { bom: true });
    expect(row).toEqual(["Prüfplatz"]);
  });
});
