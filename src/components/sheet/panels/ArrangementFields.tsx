import type { ArrangementKind, PhaseOrder } from "~/domain/plan-document/arrangement";
import type { Circuit } from "~/domain/plan-document/circuit";
import {
  arrangementTitles,
  fittingKinds,
  hasPhases,
  rearranged,
  withPhaseOrder,
  withSets,
} from "~/sheet/edits/arrangements";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import { useSheetStore } from "../store";
import type { ChangeCircuit } from "./changes";
import { ConductorsTable } from "./ConductorsTable";

/** Where the phases lie, seen along the route. */
function phaseWords(
  kind: ArrangementKind,
  [a = "L1", b = "L2", c = "L3"]: readonly string[],
): string | undefined {
  if (kind === "flat") return `${a}, ${b}, ${c} from the left, seen along the route.`;
  if (kind === "trefoil") return `${a} and ${b} below, ${c} on top, seen along the route.`;
  if (kind === "quad") return `${a}, ${b}, ${c}, N clockwise from the upper left, seen along the route.`;
  if (kind === "flat-n") return `${a}, ${b}, ${c}, N from the left, seen along the route.`;
  return kind === "pair" ? "Go on the left, return on the right, seen along the route." : undefined;
}

const orders: readonly PhaseOrder[] = ["abc", "bca", "cab", "acb", "cba", "bac"];

interface Props {
  circuit: Circuit;
  change: ChangeCircuit;
  disabled: boolean;
}

/** How the conductors lie in the section. */
export function ArrangementFields({ circuit, change, disabled }: Props) {
  const { phaseLabels } = useSheetStore();
  const { arrangement } = circuit;
  const parallel = "parallel" in arrangement ? arrangement.parallel : null;
  const labelOf = (order: PhaseOrder): string =>
    [...order].map((phase) => phaseLabels["abc".indexOf(phase)] ?? phase).join(", ");
  return (
    <>
      <div className="grid grid-cols-2 gap-3">
        <Choice
          label="Arrangement"
          value={arrangement.kind}
          hint={phaseWords(arrangement.kind, phaseLabels)}
          options={fittingKinds(circuit).map((kind) => ({ value: kind, label: arrangementTitles[kind] }))}
          disabled={disabled}
          onChange={(kind) => change("Arrangement", (present) => rearranged(present, kind))}
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
        {arrangement.kind === "twisted-pair" && (
          <NumberField
            label="Lay, length of one twist"
            unit="mm"
            perUnit={1000}
            above={0}
            most={1000}
            value={arrangement.layM}
            disabled={disabled}
            onChange={(layM) =>
              change("Lay", (present) => ({ ...present, arrangement: { ...arrangement, layM } }))
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
        {arrangement.kind !== "custom" && (
          <NumberField
            label="Sets in parallel"
            least={1}
            most={100}
            whole
            value={parallel?.sets ?? 1}
            hint="Side by side; each carries its share."
            disabled={disabled}
            onChange={(sets) =>
              change("Sets in parallel", (present) => ({
                ...present,
                arrangement: withSets(present.arrangement, sets),
              }))
            }
          />
        )}
        {arrangement.kind !== "custom" && parallel !== null && (
          <NumberField
            label="Pitch of the sets"
            unit="mm"
            perUnit={1000}
            above={0}
            most={100}
            value={parallel.pitchM}
            disabled={disabled}
            onChange={(pitchM) =>
              change("Pitch of the sets", (present) => ({
                ...present,
                arrangement: { ...arrangement, parallel: { ...parallel, pitchM } } as typeof arrangement,
              }))
            }
          />
        )}
      </div>
      {hasPhases(arrangement) && arrangement.parallel !== null && (
        <fieldset className="grid grid-cols-2 gap-3">
          <legend className="mb-1 text-sm font-semibold">Phase order of each set, from the left</legend>
          {Array.from({ length: arrangement.parallel.sets }, (_, set) => (
            <Choice
              key={set}
              label={`Set ${set + 1}`}
              value={arrangement.parallel?.phaseOrders?.[set] ?? "abc"}
              options={orders.map((order) => ({ value: order, label: labelOf(order) }))}
              disabled={disabled}
              onChange={(order) =>
                change("Phase order", (present) => ({
                  ...present,
                  arrangement: withPhaseOrder(present.arrangement, set, order),
                }))
              }
            />
          ))}
        </fieldset>
      )}
      {arrangement.kind === "custom" && (
        <ConductorsTable
          key={JSON.stringify(arrangement.conductors)}
          circuit={circuit}
          arrangement={arrangement}
          change={change}
          disabled={disabled}
        />
      )}
    </>
  );
}
