import type { TableRow } from "./read-table";

export const columnNames = ["tag", "from", "to", "cores", "size", "load"] as const;
export type ColumnName = (typeof columnNames)[number];

/** Which column of the table holds what; null where none does. */
export type ColumnMapping = Readonly<Record<ColumnName, number | null>>;

/** Headings as schedules use them, letters and digits only, in lower case, without a unit in brackets. */
const headings: Record<ColumnName, readonly string[]> = {
  tag: [
    "tag",
    "cable",
    "cableno",
    "cablenumber",
    "cabletag",
    "cableid",
    "circuit",
    "circuitno",
    "id",
    "kabel",
    "kabelnr",
    "ref",
    "reference",
  ],
  from: ["from", "source", "origin", "start", "fromequipment", "von", "feeder"],
  to: ["to", "destination", "target", "end", "toequipment", "nach", "consumer"],
  cores: ["cores", "core", "noofcores", "numberofcores", "corecount", "conductors", "adern", "aderzahl"],
  size: [
    "size",
    "csa",
    "crosssection",
    "sizemm2",
    "sizemm",
    "area",
    "conductorsize",
    "querschnitt",
    "conductorsizemm2",
  ],
  load: [
    "load",
    "loada",
    "current",
    "currenta",
    "designcurrent",
    "designcurrenta",
    "amps",
    "amperes",
    "ib",
    "a",
    "ampere",
    "strom",
    "loadcurrent",
    "loadcurrenta",
  ],
};

const plain = (heading: string): string =>
  heading
    .replace(/[([].*?[)\]]/g, "")
    .replace(/²/g, "2")
    .toLowerCase()
    .replace(/[^a-z0-9]/g, "");

const columnOfHeading = (heading: string): ColumnName | null =>
  columnNames.find((name) => headings[name].some((known) => plain(known) === plain(heading))) ?? null;

const inOrder = (columns: number): ColumnMapping =>
  Object.fromEntries(
    columnNames.map((name, index) => [name, index < columns ? index : null]),
  ) as ColumnMapping & Record<ColumnName, number | null>;

/**
 * Finds the row of headings among the first ten rows. Without one the columns are taken in the order tag, from, to,
 * cores, size, load.
 * @returns the mapping and how many rows stand above the first row of data
 */
export function findColumns(rows: readonly TableRow[]): { mapping: ColumnMapping; headingRows: number } {
  for (const [index, row] of rows.slice(0, 10).entries()) {
    const found = new Map<ColumnName, number>();
    row.cells.forEach((cell, column) => {
      const name = columnOfHeading(cell);
      if (name !== null && !found.has(name)) found.set(name, column);
    });
    if (found.size >= 2) {
      const mapping = Object.fromEntries(columnNames.map((name) => [name, found.get(name) ?? null]));
      return { mapping: mapping as Record<ColumnName, number | null>, headingRows: index + 1 };
    }
  }
  const widest = Math.max(0, ...rows.map((row) => row.cells.length));
  return { mapping: inOrder(widest), headingRows: 0 };
}
