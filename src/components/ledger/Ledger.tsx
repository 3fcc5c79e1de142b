import { useMemo } from "react";
import { positionsWorstFirst } from "~/domain/positions";
import { drawnSourceCount, numberedSources, sourceFinder } from "~/domain/sources";
import { fromSourcesDrawn } from "~/domain/verdict-words";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Live } from "~/components/sheet/store";
import { LedgerEntry } from "./LedgerEntry";

interface Props {
  document: PlanDocument;
  live: Live;
  litId: string | null;
  onLight: (circuitId: string | null) => void;
  selectedSensorId: string | null;
  onSelect: (sensorId: string) => void;
}

/** Every sensor worst first, with what it has of its budget and who spends it. */
export function Ledger({ document, live, litId, onLight, selectedSensorId, onSelect }: Props) {
  const find = useMemo(() => sourceFinder(numberedSources(document)), [document]);
  const positions = useMemo(
    () => (live.kind === "screened" ? positionsWorstFirst(document, live.result) : []),
    [document, live],
  );
  const unjudged = document.sensors.filter(({ id }) => !positions.some(({ sensor }) => sensor.id === id));
  return (
    <section aria-labelledby="ledger-title">
      <h2 id="ledger-title" className="text-base">
        Ledger
      </h2>
      <p className="text-xs text-muted" data-testid="ledger-basis">
        {document.sensors.length === 0
          ? "No sensor is placed yet."
          : `Worst first, ${fromSourcesDrawn(drawnSourceCount(document))}.`}
      </p>
      <LedgerMessages live={live} hasSensors={document.sensors.length > 0} />
      <ol className="mt-2 grid gap-1">
        {positions.map((position) => (
          <LedgerEntry
            key={position.sensor.id}
            position={position}
            loadCases={document.loadCases}
            find={find}
            litId={litId}
            onLight={onLight}
            selected={position.sensor.id === selectedSensorId}
            onSelect={onSelect}
          />
        ))}
      </ol>
      {live.kind === "screened" && unjudged.length > 0 && (
        <p className="mt-2 text-sm text-muted">
          Not judged yet: {unjudged.map(({ name }) => name).join(", ")}.
        </p>
      )}
      {live.kind === "screened" && <Checks live={live} />}
    </section>
  );
}

function LedgerMessages({ live, hasSensors }: { live: Live; hasSensors: boolean }) {
  if (live.kind === "refused") {
    return (
      <div className="message message-undecided mt-2" role="status">
        <p>{live.message}</p>
        <ul className="mt-1 list-disc pl-5">
          {live.faults.slice(0, 5).map(({ path, message }) => (
            <li key={`${path}: ${message}`}>
              <span className="font-semibold">{path}</span>: {message}
            </li>
          ))}
        </ul>
      </div>
    );
  }
  return live.kind === "waiting" && hasSensors ? (
    <p className="mt-2 text-sm text-muted" role="status">
      Screening…
    </p>
  ) : null;
}

function Checks({ live }: { live: Extract<Live, { kind: "screened" }> }) {
  const { openEnds, warnings } = live.result.checks;
  if (openEnds.length === 0 && warnings.length === 0) return null;
  return (
    <details className="mt-3 text-sm">
      <summary className="text-muted">
        {openEnds.length + warnings.length === 1
          ? "1 remark"
          : `${openEnds.length + warnings.length} remarks`}{" "}
        of the engine
      </summary>
      <ul className="mt-1 list-disc pl-5">
        {openEnds.map(({ at, currentA }) => (
          <li key={at.join()}>
            {Number(currentA.toPrecision(3))} A leave at x {at[0].toFixed(2)}, y {at[1].toFixed(2)}, z{" "}
            {at[2].toFixed(2)} m and no way back is drawn.
          </li>
        ))}
        {warnings.map((warning) => (
          <li key={warning}>{warning}</li>
        ))}
      </ul>
    </details>
  );
}
