import { columnNames } from "~/sheet/cable-schedule/columns";
import type { ScheduleRow } from "~/sheet/cable-schedule/read-schedule";

const shownRows = 200;

/** Each row as it was read, those at fault with what is wrong. */
export function SchedulePreview({ rows }: { rows: readonly ScheduleRow[] }) {
  const faulty = rows.filter(({ cable }) => cable === null).length;
  const loadless = rows.filter(({ cable }) => cable !== null && cable.load === null).length;
  return (
    <div>
      <p role="status">
        {rows.length - faulty} of {rows.length} rows can be taken in
        {faulty > 0 && `, ${faulty} ${faulty === 1 ? "is" : "are"} at fault and left out`}
        {loadless > 0 && `; ${loadless} without a load wait for their current`}.
      </p>
      <div
        className="table-scroll max-h-72 overflow-y-auto"
        tabIndex={0}
        role="region"
        aria-label="Preview of the schedule"
      >
        <table className="table">
          <caption className="sr-only">Rows of the schedule</caption>
          <thead>
            <tr>
              <th scope="col">Line</th>
              {columnNames.map((name) => (
                <th key={name} scope="col">
                  {name}
                </th>
              ))}
              <th scope="col">Remark</th>
            </tr>
          </thead>
          <tbody>
            {rows.slice(0, shownRows).map(({ line, cells, problems, cable }) => (
              <tr key={line} className={cable === null ? "text-muted" : ""}>
                <th scope="row">{line}</th>
                {columnNames.map((name) => (
                  <td key={name}>{cells[name]}</td>
                ))}
                <td className={problems.length > 0 ? "text-over" : ""}>
                  {problems.length > 0
                    ? `▲ ${problems.join("; ")}`
                    : cable?.load === null
                      ? "current not known"
                      : "sound"}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {rows.length > shownRows && <p className="text-muted">and {rows.length - shownRows} more rows.</p>}
    </div>
  );
}
