import { parse } from "csv-parse/browser/esm/sync";

/** Windows-1252 from 0x80 to 0x9f (WHATWG encoding standard); everything else is the code point of the byte. */
const windows1252 = "€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ";

// Node's own decoder takes these bytes for control characters, so this one is used everywhere.
const decodeWindows1252 = (bytes: Uint8Array): string =>
  Array.from(bytes, (byte) =>
    byte >= 0x80 && byte <= 0x9f ? windows1252.charAt(byte - 0x80) : String.fromCharCode(byte),
  ).join("");

/** Text of a file saved by a spreadsheet: UTF-8 or UTF-16 with or without its mark, otherwise Windows-1252. */
export function decodeText(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder("utf-16le").decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder("utf-16be").decode(bytes);
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch (refused) {
    if (!(refused instanceof TypeError)) throw refused;
    return decodeWindows1252(bytes);
  }
}

export type Delimiter = "\t" | ";" | ",";

/** A tab marks a paste from a spreadsheet; otherwise whichever separates more columns of the first ten lines. */
export function guessDelimiter(text: string): Delimiter {
  const head = text.split(/\r\n|\r|\n/, 10).join("\n");
  const outsideQuotes = head.replace(/"[^"]*"/g, "");
  const count = (delimiter: Delimiter): number => outsideQuotes.split(delimiter).length - 1;
  if (count("\t") > 0) return "\t";
  return count(";") > 0 && count(";") >= count(",") ? ";" : ",";
}

export interface TableRow {
  /** Line of the input on which the row ends, from 1. */
  line: number;
  cells: readonly string[];
}

/** Rows of the table with their cells trimmed; empty rows are left out. */
export function readTable(text: string, delimiter: Delimiter): TableRow[] {
  const parsed = parse(text, {
    bom: true,
    delimiter,
    info: true,
    relax_column_count: true,
    relax_quotes: true,
    skip_empty_lines: true,
    trim: true,
  }) as unknown as { info: { lines: number }; record: string[] }[];
  return parsed
    .map(({ info, record }) => ({ line: info.lines, cells: record }))
    .filter(({ cells }) => cells.some((cell) => cell !== ""));
}
