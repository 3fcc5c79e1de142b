/** A cell: text is defused, a number is written as it is, null is empty. */
export type CsvCell = string | number | null;

/** What a spreadsheet takes for the beginning of a formula, full-width forms included. */
const formulaStart = /^[=+\-@\t\r\n＝＋－＠]/u;
const plainNumber = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
/** Separators of other countries' spreadsheets count too: they would split the cell and see a formula in its second half. */
const needsQuotes = /[",;\t\r\n]/;

/** Puts an apostrophe before text that a spreadsheet would compute; numbers written as text stay numbers. */
export function defused(text: string): string {
  return formulaStart.test(text) && !plainNumber.test(text) ? `'${text}` : text;
}

function csvField(cell: CsvCell): string {
  if (cell === null) return "";
  if (typeof cell === "number") return String(cell);
  const text = defused(cell);
  return needsQuotes.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** A table as RFC 4180 has it: commas, CR LF after every line, quotes doubled; decimal points. */
export function csvText(rows: readonly (readonly CsvCell[])[]): string {
  return rows.map((row) => `${row.map(csvField).join(",")}\r\n`).join("");
}

/** Stands before CSV that people open: spreadsheets take UTF-8 for it only so. */
export const byteOrderMark = "\ufeff";
