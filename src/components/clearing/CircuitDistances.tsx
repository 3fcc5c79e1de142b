import { Button } from "~/components/ui/Button";
import { Decimal } from "~/components/ui/FormattedField";
import { formatNumber } from "~/domain/format";
import { type ClearingAnswer, useClearing } from "./use-clearing";

interface Props {
  /** Address of the screening in the API. */
  api: string;
  sources: readonly { id: string; key: string; name: string }[];
}

type Distances = NonNullable<ClearingAnswer["distances"]>;

/** How far from each circuit every tolerance is met, DC and AC apart. Asked for once it is in sight. */
export function CircuitDistances({ api, sources }: Props) {
  const { asked, again } = useClearing(`${api}/clearing?part=distances`);
  if (asked.state === "working")
    return (
      <p className="no-print text-sm text-muted" role="status">
        Working out the distances…
      </p>
    );
  if (asked.state === "failed")
    return (
      <div className="no-print text-sm" role="alert">
        <p className="field-error">{asked.message}</p>
        <Button onClick={again}>Try again</Button>
      </div>
    );
  const { distances } = asked.answer;
  if (distances === null || distances.circuits.length === 0)
    return <p className="text-sm">No circuit is traced with its current.</p>;
  const ofDc = (limitIds: readonly string[]) => limitIds.includes("compass-18");
  const split = (isDc: boolean) =>
    distances.circuits.filter(({ entries }) => ofDc(entries.map(({ limitId }) => limitId)) === isDc);
  return (
    <div className="grid gap-6">
      <DistanceTable caption="DC circuits" circuits={split(true)} distances={distances} sources={sources} />
      <DistanceTable caption="AC circuits" circuits={split(false)} distances={distances} sources={sources} />
    </div>
  );
}

interface TableProps extends Pick<Props, "sources"> {
  caption: string;
  circuits: Distances["circuits"];
  distances: Distances;
}

function DistanceTable({ caption, circuits, distances, sources }: TableProps) {
  const [first] = circuits;
  if (first === undefined) return null;
  const columns = first.entries.map(({ limitId }) => distances.limits.find(({ id }) => id === limitId));
  return (
    <div className="table-scroll" role="region" aria-label={`${caption}, scrolls sideways`} tabIndex={0}>
      <table className="table">
        <caption>{caption}, metres from the centre line</caption>
        <thead>
          <tr>
            <th scope="col">Circuit</th>
            {columns.map((limit, index) => (
              <th
                key={limit?.id ?? index}
                scope="col"
                className="number whitespace-normal! min-w-24 align-bottom!"
              >
                {limit?.label}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {circuits.map(({ circuitId, entries }) => {
            const source = sources.find(({ id }) => id === circuitId);
            return (
              <tr key={circuitId}>
                <th scope="row" className="min-w-48 font-normal!">
                  <span className="flex items-baseline gap-2.5">
                    <span className="source-key">{source?.key}</span>
                    <span>{source?.name ?? circuitId}</span>
                  </span>
                </th>
                {entries.map(({ limitId, statedM }) => (
                  <td key={limitId} className="number">
                    {statedM === null ? (
                      `over ${String(distances.reachM)}`
                    ) : (
                      <Decimal text={formatNumber(statedM, 2)} />
                    )}
                  </td>
                ))}
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
