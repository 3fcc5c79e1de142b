import { Decimal } from "~/components/ui/FormattedField";
import { Verdict } from "~/components/ui/Verdict";
import { formatShare } from "~/domain/format";
import type { ClearingAnswer } from "./use-clearing";

type Change = ClearingAnswer["changes"][number];

interface Props {
  changes: readonly Change[];
  sensorId: string;
  nameOf: (sensorId: string) => string;
}

/** Lines before the rest is folded away. */
const SHOWN = 5;

/** Single changes that give some of a position's budget back, most first. */
export function SingleChanges({ changes, sensorId, nameOf }: Props) {
  if (changes.length === 0)
    return <p className="text-sm">No single change of the cabling gives any of this budget back.</p>;
  const rest = changes.slice(SHOWN);
  return (
    <>
      <ChangeTable changes={changes.slice(0, SHOWN)} sensorId={sensorId} nameOf={nameOf} />
      {rest.length > 0 && (
        <details className="mt-2">
          <summary className="text-sm">{rest.length} more, with less effect</summary>
          <ChangeTable changes={rest} sensorId={sensorId} nameOf={nameOf} />
        </details>
      )}
    </>
  );
}

function ChangeTable({ changes, sensorId, nameOf }: Props) {
  return (
    <table className="table table-stack">
      <caption className="sr-only">Single changes for {nameOf(sensorId)}, most effective first</caption>
      <thead>
        <tr>
          <th scope="col">One change</th>
          <th scope="col" className="number">
            Budget used after it, with U
          </th>
          <th scope="col" className="whitespace-nowrap">
            Verdict after it
          </th>
        </tr>
      </thead>
      <tbody>
        {changes.map((change) => {
          const after = change.sensors.find(({ id }) => id === sensorId)?.after;
          if (after === undefined) return null;
          return (
            <tr key={change.words}>
              <th scope="row" className="font-normal!">
                {change.words}.
                {change.spoils !== null && change.spoils.length > 0 && (
                  <span className="block text-over">
                    No longer within after it: {change.spoils.map(nameOf).join(", ")}.
                  </span>
                )}
              </th>
              <td className="number" data-label="budget used after it, with U">
                <Decimal text={formatShare(after.reach)} />
              </td>
              <td>
                <Verdict verdict={after.verdict} />
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
