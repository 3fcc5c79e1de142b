import type { ColumnMapping, ColumnName } from "./columns";
import { columnNames } from "./columns";
import type { TableRow } from "./read-table";
import { readCores, readLoad, readSizeMm2, type Cores, type Load, type Read } from "./values";

/** One cable of the schedule. What the schedule leaves open is null. */
export interface Cable {
  tag: string;
  from: string;
  to: string;
  cores: Cores | null;
  sizeMm2: number | null;
  load: Load | null;
}

export interface ScheduleRow {
  line: number;
  /** What stood in the cells, for the preview. */
  cells: Readonly<Record<ColumnName, string>>;
  /** Null when there are `problems`. */
  cable: Cable | null;
  problems: readonly string[];
  /** True where the plan has a circuit of that tag already; such a row is left out unless its problems are mended. */
  known: boolean;
}

const cellsOf = (row: TableRow, mapping: ColumnMapping): Record<ColumnName, string> =>
  Object.fromEntries(
    columnNames.map((name) => [name, mapping[name] === null ? "" : (row.cells[mapping[name]] ?? "")]),
  ) as Record<ColumnName, string>;

/**
 * Reads each row of data by itself, so that one bad row spoils no other.
 * @param knownTags tags that the plan has already, compared without regard to case
 */
export function readSchedule(
  rows: readonly TableRow[],
  mapping: ColumnMapping,
  knownTags: readonly string[],
): ScheduleRow[] {
  const inPlan = new Set(knownTags.map((tag) => tag.trim().toLowerCase()));
  const lineOfTag = new Map<string, number>();
  return rows.map((row) => {
    const cells = cellsOf(row, mapping);
    const problems: string[] = [];
    const take = <T>(read: Read<T>): T | null => {
      if (read.ok) return read.value;
      problems.push(read.problem);
      return null;
    };
    const key = cells.tag.toLowerCase();
    const known = inPlan.has(key);
    const earlier = lineOfTag.get(key);
    if (cells.tag === "") problems.push("no tag");
    else if (earlier !== undefined) problems.push(`tag “${cells.tag}” stands on line ${earlier} already`);
    else if (known) problems.push(`the plan has a circuit “${cells.tag}” already`);
    else lineOfTag.set(key, row.line);
    const cores = take(readCores(cells.cores));
    const sizeMm2 = take(readSizeMm2(cells.size));
    const load = take(readLoad(cells.load));
    const cable =
      problems.length > 0 ? null : { tag: cells.tag, from: cells.from, to: cells.to, cores, sizeMm2, load };
    return { line: row.line, cells, cable, problems, known };
  });
}
