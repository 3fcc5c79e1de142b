import { Button } from "~/components/ui/Button";
import { AllowableCurrents } from "./AllowableCurrents";
import { ClearPositions } from "./ClearPositions";
import { SingleChanges } from "./SingleChanges";
import { useClearing } from "./use-clearing";

interface Props {
  /** Address of the screening in the API. */
  api: string;
  sensorId: string;
  sensorNames: readonly { id: string; name: string }[];
  sources: readonly { id: string; key: string; name: string }[];
  limits: readonly { id: string; measured: string }[];
}

/** What would clear one flagged position: other places, single changes, less current. Asked for once it is in sight. */
export function PositionClearing({ api, sensorId, sensorNames, sources, limits }: Props) {
  const { asked, again } = useClearing(`${api}/clearing?position=${encodeURIComponent(sensorId)}`);
  const nameOf = (id: string) => sensorNames.find((sensor) => sensor.id === id)?.name ?? id;
  if (asked.state === "working")
    return (
      <p className="no-print text-sm text-muted" role="status">
        Working out what would clear it…
      </p>
    );
  if (asked.state === "failed")
    return (
      <div className="no-print text-sm" role="alert">
        <p className="field-error">{asked.message}</p>
        <Button onClick={again}>Try again</Button>
      </div>
    );
  const { sensors, changes } = asked.answer;
  const [own] = sensors;
  if (own === undefined) return <p className="text-sm">It is within.</p>;
  return (
    <div className="grid gap-5">
      {own.positions !== null && (
        <section>
          <h5 className="keep-with-next mb-1 text-sm font-semibold">Nearest clear positions</h5>
          <ClearPositions positions={own.positions} sensorName={nameOf(sensorId)} />
        </section>
      )}
      <section>
        <h5 className="keep-with-next mb-1 text-sm font-semibold">Single changes, most effective first</h5>
        <SingleChanges changes={changes} sensorId={sensorId} nameOf={nameOf} />
      </section>
      <section>
        <h5 className="keep-with-next mb-1 text-sm font-semibold">
          Current of one circuit alone, all else unchanged
        </h5>
        <AllowableCurrents
          currents={own.currents}
          waiting={own.waiting}
          sensorName={nameOf(sensorId)}
          sourceOf={(id) => sources.find((source) => source.id === id) ?? { key: "?", name: id }}
          measuredBy={(id) => limits.find((limit) => limit.id === id)?.measured ?? id}
        />
      </section>
    </div>
  );
}
