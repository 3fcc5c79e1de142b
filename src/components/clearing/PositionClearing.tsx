import type { ReactNode } from "react";
import { Button } from "~/components/ui/Button";
import type { ClearingPart } from "~/domain/clearing";
import { AllowableCurrents } from "./AllowableCurrents";
import { ClearPositions } from "./ClearPositions";
import { SingleChanges } from "./SingleChanges";
import { useClearing, type ClearingAnswer } from "./use-clearing";

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
  const nameOf = (id: string) => sensorNames.find((sensor) => sensor.id === id)?.name ?? id;
  const address = `${api}/clearing?position=${encodeURIComponent(sensorId)}`;
  return (
    <div className="grid gap-5">
      <Part address={address} part="positions" title="Nearest clear positions">
        {({ sensors: [own] }) =>
          own?.positions && <ClearPositions positions={own.positions} sensorName={nameOf(sensorId)} />
        }
      </Part>
      <Part address={address} part="changes" title="Single changes, most effective first">
        {({ changes }) => <SingleChanges changes={changes} sensorId={sensorId} nameOf={nameOf} />}
      </Part>
      <Part address={address} part="currents" title="Current of one circuit alone, all else unchanged">
        {({ sensors: [own] }) =>
          own && (
            <AllowableCurrents
              currents={own.currents}
              waiting={own.waiting}
              sensorName={nameOf(sensorId)}
              sourceOf={(id) => sources.find((source) => source.id === id) ?? { key: "?", name: id }}
              measuredBy={(id) => limits.find((limit) => limit.id === id)?.measured ?? id}
            />
          )
        }
      </Part>
    </div>
  );
}

interface PartProps {
  address: string;
  part: ClearingPart;
  title: string;
  children: (answer: ClearingAnswer) => ReactNode;
}

/** Each part is asked for by itself: on a large plan one may take as long as the server gives to a request. */
function Part({ address, part, title, children }: PartProps) {
  const { asked, again } = useClearing(`${address}&part=${part}`);
  return (
    <section className={asked.state === "answered" ? undefined : "no-print"}>
      <h5 className="keep-with-next mb-1 text-sm font-semibold">{title}</h5>
      {asked.state === "working" && (
        <p className="text-sm text-muted" role="status">
          Working it out…
        </p>
      )}
      {asked.state === "failed" && (
        <div className="text-sm" role="alert">
          <p className="field-error">{asked.message}</p>
          <Button onClick={again}>Try again</Button>
        </div>
      )}
      {asked.state === "answered" && (children(asked.answer) || <p className="text-sm">It is within.</p>)}
    </section>
  );
}
