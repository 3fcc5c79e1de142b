import type { AllowableCurrent, WaitingCurrent } from "~/domain/clearing";
import { formatCurrent, formatNumber } from "~/domain/format";

interface Props {
  currents: readonly AllowableCurrent[];
  waiting: readonly WaitingCurrent[];
  sensorName: string;
  sourceOf: (circuitId: string) => { key: string; name: string };
  /** What a limit compares, in words. */
  measuredBy: (limitId: string) => string;
}

/** What the current of one circuit alone may be. */
export function AllowableCurrents({ currents, waiting, sensorName, sourceOf, measuredBy }: Props) {
  const rows = rowsOf(currents);
  return (
    <>
      {rows.length === 0 ? (
        <p className="text-sm">Less current in one circuit alone does not clear it.</p>
      ) : (
        <table className="table table-stack">
          <caption className="sr-only">Allowable current of one circuit alone for {sensorName}</caption>
          <thead>
            <tr>
              <th scope="col">Circuit</th>
              <th scope="col" className="number">
                Now
              </th>
              <th scope="col" className="number">
                Allowable
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((current) => {
              const { key, name } = sourceOf(current.circuitId);
              return (
                <tr key={`${current.circuitId} ${current.limitId ?? ""}`}>
                  <th scope="row" className="font-normal!">
                    <span className="flex items-baseline gap-2.5">
                      <span className="source-key">{key}</span>
                      <span>
                        {name}
                        {current.limitId !== null && (
                          <span className="text-muted">, {measuredBy(current.limitId)} only</span>
                        )}
                      </span>
                    </span>
                  </th>
                  <td className="number" data-label="now">
                    {formatCurrent(current.presentA)}
                  </td>
                  <td className="number" data-label="allowable">
                    {allowableText(current)}
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
      )}
      {waiting.length > 0 && (
        <ul className="mt-2 grid gap-1 text-sm">
          {waiting.map(({ circuitId, limitId, kind, frequencyHz, fullAtA }) => (
            <li key={`${circuitId} ${limitId} ${kind}`}>
              {sourceOf(circuitId).name}, current not known: the budget of {measuredBy(limitId)}{" "}
              {fullAtA === null
                ? "is full without it."
                : `would be full at ${floored(fullAtA)} ${kind === "dc" ? "DC" : `AC, ${String(frequencyHz)}\u00a0Hz`}.`}
            </li>
          ))}
        </ul>
      )}
    </>
  );
}

const allowable = ({ atMost, between }: AllowableCurrent): boolean => atMost !== null || between !== null;

/** All limits together where that can be had, otherwise the limits that can. */
function rowsOf(currents: readonly AllowableCurrent[]): AllowableCurrent[] {
  const whole = new Set(
    currents.filter((current) => current.limitId === null && allowable(current)).map((c) => c.circuitId),
  );
  return currents.filter(
    (current) => allowable(current) && (current.limitId === null || !whole.has(current.circuitId)),
  );
}

/** Rounded down, so that what is read still clears. */
function floored(currentA: number): string {
  const decimals = Math.abs(currentA) >= 100 ? 0 : currentA >= 10 ? 1 : 2;
  const step = 10 ** decimals;
  return `${formatNumber(Math.floor(currentA * step + 1e-9) / step, decimals)}\u00a0A`;
}

function allowableText({ atMost, between }: AllowableCurrent): string {
  if (atMost) return `at most ${floored(atMost.currentA)}`;
  return between ? `${formatCurrent(between.fromA)} to ${floored(between.toA)}` : "none";
}
