import { Button } from "~/components/ui/Button";
import { isTraced } from "~/sheet/edits/circuits";
import { FullAt } from "./FullAt";
import { useWaitingCurrents } from "./use-waiting-currents";
import { beginStep, focusDrawing } from "../StepBar";
import { useDocument, useEditable, useSheetStore } from "../store";

/** Circuits of the cable schedule that are not traced yet, or whose current is not known. */
export function WaitingPanel({ onOpenSchedule }: { onOpenSchedule: () => void }) {
  const store = useSheetStore();
  const editable = useEditable();
  const document = useDocument();
  const { circuits } = document;
  const full = useWaitingCurrents(document);
  const untraced = circuits.filter((circuit) => !isTraced(circuit));
  const unloaded = circuits.filter((circuit) => isTraced(circuit) && circuit.supply === null);
  return (
    <div className="grid gap-3 text-sm">
      {editable && (
        <Button small className="justify-self-start" onClick={onOpenSchedule}>
          Read a cable schedule…
        </Button>
      )}
      {untraced.length === 0 && unloaded.length === 0 && <p className="text-muted">Nothing waits.</p>}
      {untraced.length > 0 && (
        <>
          <h3>Waiting to be traced</h3>
          <ul className="grid gap-1">
            {untraced.map(({ id, name, supply }) => (
              <li key={id} className="flex items-center justify-between gap-2 border-b border-rule py-1">
                <button
                  type="button"
                  className="min-h-6 cursor-pointer text-left hover:underline"
                  onClick={() => store.select([{ kind: "circuit", id }])}
                >
                  {name}
                  {supply === null && <span className="text-muted"> (current not known)</span>}
                </button>
                {editable && (
                  <Button
                    small
                    aria-label={`Trace ${name}`}
                    onClick={() => {
                      beginStep(store, "trace-route", { id, name });
                      focusDrawing();
                    }}
                  >
                    Trace
                  </Button>
                )}
              </li>
            ))}
          </ul>
        </>
      )}
      {unloaded.length > 0 && (
        <>
          <h3>Current not known</h3>
          <ul className="grid gap-1">
            {unloaded.map(({ id, name }) => (
              <li key={id} className="border-b border-rule py-1">
                <button
                  type="button"
                  className="min-h-6 cursor-pointer text-left hover:underline"
                  onClick={() => store.select([{ kind: "circuit", id }])}
                >
                  {name}
                </button>
                <FullAt circuitId={id} full={full} />
              </li>
            ))}
          </ul>
          {full.kind === "asking" && (
            <p className="text-muted">Working out at which currents budgets would be full…</p>
          )}
          {full.kind === "refused" && <p className="text-muted">{full.message}</p>}
        </>
      )}
    </div>
  );
}
