import { Decimal } from "~/components/ui/FormattedField";
import type { SensorClearing } from "~/domain/clearing";
import { formatLength, formatShare } from "~/domain/format";
import { moveWords, searchedWords } from "./clearing-words";

interface Props {
  positions: NonNullable<SensorClearing["positions"]>;
  sensorName: string;
}

/** The nearest places where the sensor would be within. */
export function ClearPositions({ positions: { searched, suggestions }, sensorName }: Props) {
  if (suggestions.length === 0)
    return <p className="text-sm">No clear position was found {searchedWords(searched)}.</p>;
  const waits = suggestions.some(({ butForWaiting }) => butForWaiting);
  return (
    <>
      <table className="table table-stack">
        <caption className="sr-only">Nearest clear positions for {sensorName}</caption>
        <thead>
          <tr>
            <th scope="col">Move it</th>
            <th scope="col" className="number">
              x
            </th>
            <th scope="col" className="number">
              y
            </th>
            <th scope="col" className="number">
              Height
            </th>
            <th scope="col" className="number">
              Budget used there, with U
            </th>
          </tr>
        </thead>
        <tbody>
          {suggestions.map((suggestion) => {
            const [x, y, z] = suggestion.position;
            return (
              <tr key={suggestion.position.join()}>
                <th scope="row" className="font-normal!">
                  {moveWords(suggestion)}
                </th>
                <td className="number" data-label="x">
                  {formatLength(x)}
                </td>
                <td className="number" data-label="y">
                  {formatLength(y)}
                </td>
                <td className="number" data-label="height">
                  {formatLength(z)}
                </td>
                <td className="number" data-label="budget used there, with U">
                  <Decimal text={formatShare(suggestion.reach)} />
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
      <p className="mt-2 text-xs text-muted">
        Looked for {searchedWords(searched)}; each was screened on all its limits in all load cases.
        {waits && " Within but for what still waits for its path or current."}
      </p>
    </>
  );
}
