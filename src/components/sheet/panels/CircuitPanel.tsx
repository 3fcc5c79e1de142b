import type { ReactNode } from "react";
import { Button } from "~/components/ui/Button";
import type { Arrangement } from "~/domain/plan-document/arrangement";
import type { Circuit } from "~/domain/plan-document/circuit";
import {
  addCircuitToRoute,
  arrangementOf,
  fitsSupply,
  isTraced,
  offeredArrangements,
  updateCircuit,
} from "~/sheet/edits/circuits";
import { removeCircuitAndEmptyRoute } from "~/sheet/edits/remove";
import { Choice } from "../inputs/Choice";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import { beginStep, focusDrawing } from "../StepBar";
import { useDocument, useEditable, useSheetStore } from "../store";
import { SupplyFields } from "./SupplyFields";
import { ToleranceFields } from "./ToleranceFields";
import { VertexList } from "./VertexList";

function arrangementOptions(circuit: Circuit): { value: Arrangement["kind"]; label: string }[] {
  const { arrangement, supply } = circuit;
  const fitting = offeredArrangements.filter(({ kind }) => supply === null || fitsSupply(kind, supply.kind));
  const options: { value: Arrangement["kind"]; label: string }[] = fitting.map(({ kind, label }) => ({
    value: kind,
    label,
  }));
  return options.some(({ value }) => value === arrangement.kind)
    ? options
    : [...options, { value: arrangement.kind, label: arrangement.kind }];
}

/** Where the phases lie, seen along the route. */
function phaseWords(
  kind: Arrangement["kind"],
  [a = "L1", b = "L2", c = "L3"]: readonly string[],
): string | undefined {
  if (kind === "flat") return `${a}, ${b}, ${c} from the left, seen along the route.`;
  if (kind === "trefoil") return `${a} and ${b} below, ${c} on top, seen along the route.`;
  if (kind === "quad") return `${a}, ${b}, ${c}, N clockwise from the upper left, seen along the route.`;
  return kind === "flat-n" ? `${a}, ${b}, ${c}, N from the left, seen along the route.` : undefined;
}

export function CircuitPanel({ circuit }: { circuit: Circuit }) {
  const store = useSheetStore();
  const document = useDocument();
  const disabled = !useEditable();
  const change = (label: string, how: (circuit: Circuit) => Circuit) =>
    store.edit(`${label} of ${circuit.name}`, (whole) => updateCircuit(whole, circuit.id, how));
  const { arrangement, route } = circuit;
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
      <div className="grid grid-cols-2 gap-3">
        <Choice
          label="Arrangement"
          value={arrangement.kind}
          hint={phaseWords(arrangement.kind, store.phaseLabels)}
          options={arrangementOptions(circuit)}
          disabled={disabled}
          onChange={(kind) => {
            const offered = offeredArrangements.find((entry) => entry.kind === kind);
            if (offered !== undefined)
              change("Arrangement", (present) => ({
                ...present,
                arrangement: arrangementOf(offered.kind, present.arrangement),
              }));
          }}
        />
        {"spacingM" in arrangement && (
          <NumberField
            label="Spacing, axis to axis"
            unit="mm"
            perUnit={1000}
            least={2 * circuit.conductorRadiusM}
            most={100}
            value={arrangement.spacingM}
            disabled={disabled}
            onChange={(spacingM) =>
              change("Spacing", (present) => ({ ...present, arrangement: { ...arrangement, spacingM } }))
            }
          />
        )}
        <NumberField
          label="Conductor radius"
          unit="mm"
          perUnit={1000}
          above={0}
          most={"spacingM" in arrangement ? arrangement.spacingM / 2 : 10}
          value={circuit.conductorRadiusM}
          disabled={disabled}
          onChange={(conductorRadiusM) =>
            change("Conductor radius", (present) => ({ ...present, conductorRadiusM }))
          }
        />
        <NumberField
          label="Turn of the section"
          unit="°"
          least={-360}
          most={360}
          value={arrangement.rollDeg}
          disabled={disabled}
          onChange={(rollDeg) =>
            change("Turn of the section", (present) => ({
              ...present,
              arrangement: { ...present.arrangement, rollDeg },
            }))
          }
        />
      </div>
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
