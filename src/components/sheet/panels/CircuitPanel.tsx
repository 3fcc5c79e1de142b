import type { ReactNode } from "react";
import { Button } from "~/components/ui/Button";
import type { Circuit } from "~/domain/plan-document/circuit";
import { addCircuitToRoute, isTraced } from "~/sheet/edits/circuits";
import { removeCircuitAndEmptyRoute } from "~/sheet/edits/remove";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import { beginStep, focusDrawing } from "../StepBar";
import { useDocument, useEditable, useSheetStore } from "../store";
import { ArrangementFields } from "./ArrangementFields";
import { useChangeCircuit } from "../use-change-circuit";
import { SupplyFields } from "./SupplyFields";
import { ToleranceFields } from "./ToleranceFields";
import { VertexList } from "./VertexList";

/** All that the plan says of a circuit. */
export function CircuitPanel({ circuit }: { circuit: Circuit }) {
  const store = useSheetStore();
  const document = useDocument();
  const disabled = !useEditable();
  const change = useChangeCircuit(circuit);
  const { route } = circuit;
  return (
    <div className="grid gap-3">
      <CommitField
        label="Name"
        value={circuit.name}
        disabled={disabled}
        onCommit={(name) => {
          if (name.length > 300) return "A name has at most 300 letters.";
          change("Name", (present) => ({ ...present, name }));
          return null;
        }}
      />
      {!isTraced(circuit) && (
        <Notice>
          Not traced yet, so the best verdict is undecided.
          {!disabled && (
            <Button
              small
              className="mt-2"
              onClick={() => {
                beginStep(store, "trace-route", { id: circuit.id, name: circuit.name });
                focusDrawing();
              }}
            >
              Trace it
            </Button>
          )}
        </Notice>
      )}
      <SupplyFields circuit={circuit} change={change} disabled={disabled} />
      <ArrangementFields circuit={circuit} change={change} disabled={disabled} />
      <ToleranceFields circuit={circuit} change={change} disabled={disabled} />
      {route !== null && (
        <fieldset className="grid grid-cols-2 gap-3">
          <legend className="mb-1 text-sm font-semibold">Place in the route, seen along it</legend>
          {(["to the right", "upwards"] as const).map((label, axis) => (
            <NumberField
              key={label}
              label={label}
              unit="mm"
              perUnit={1000}
              least={-100}
              most={100}
              value={route.placeM[axis] ?? 0}
              disabled={disabled}
              onChange={(placeM) =>
                change("Place", (present) => ({
                  ...present,
                  route: {
                    ...route,
                    placeM: axis === 0 ? [placeM, route.placeM[1]] : [route.placeM[0], placeM],
                  },
                }))
              }
            />
          ))}
        </fieldset>
      )}
      <VertexList circuit={circuit} />
      {!disabled && (
        <div className="flex flex-wrap gap-2">
          {route !== null && (
            <Button
              small
              onClick={() => {
                const added = addCircuitToRoute(document, route.id);
                store.edit("Add circuit to the route", () => added.document, [
                  { kind: "circuit", id: added.circuitId },
                ]);
              }}
            >
              Add another circuit to this route
            </Button>
          )}
          <Button
            small
            kind="danger"
            onClick={() =>
              store.edit(
                `Delete ${circuit.name}`,
                (whole) => removeCircuitAndEmptyRoute(whole, circuit.id),
                [],
              )
            }
          >
            Delete circuit
          </Button>
        </div>
      )}
    </div>
  );
}

export function Notice({ children }: { children: ReactNode }) {
  return <div className="message message-undecided grid justify-items-start">{children}</div>;
}
