import { Button } from "~/components/ui/Button";
import type { Circuit } from "~/domain/plan-document/circuit";
import { arrangementTitles, fittingKinds, rearranged } from "~/sheet/edits/arrangements";
import { balancedCurrentA, supplyOf, withCurrent, withSupply, withSupplyKind } from "~/sheet/edits/circuits";
import { removeCircuits } from "~/sheet/edits/remove";
import { numberText, readNumber } from "~/sheet/read-number";
import { basisOptions } from "../panels/basis";
import { supplyOptions, useSupplyKind } from "../panels/SupplyFields";
import { useDocument, useEditable, useSheetStore } from "../store";
import { useChangeCircuit } from "../use-change-circuit";
import { CellInput } from "./CellInput";
import { CellSelect } from "./CellSelect";

/** One circuit, each figure an edit of its own. */
export function CircuitRow({ circuit }: { circuit: Circuit }) {
  const store = useSheetStore();
  const disabled = !useEditable();
  const { routes } = useDocument();
  const { name, supply, arrangement } = circuit;
  const change = useChangeCircuit(circuit);
  const [kind, setKind] = useSupplyKind(circuit);
  const currentA = balancedCurrentA(supply);
  const isUnbalanced = supply?.kind === "ac3" && supply.phases !== undefined;
  const number = (text: string, least: number, take: (value: number) => string | null): string | null => {
    const value = readNumber(text);
    if (value === null) return "Type a number.";
    if (value < least) return `At least ${numberText(least)}.`;
    if (value > 1e6) return "At most a million.";
    return take(value);
  };
  const place = circuit.route?.id ?? (circuit.path === null ? "" : "own");
  const placeOptions = [
    { value: "", label: "not traced" },
    ...(circuit.path === null ? [] : [{ value: "own", label: "a path of its own" }]),
    ...routes.map((route) => ({ value: route.id, label: route.name })),
  ];
  return (
    <tr>
      <th scope="row">
        <CellInput
          label={`Name of circuit ${name}`}
          value={name}
          disabled={disabled}
          onCommit={(text) => {
            if (text.length > 300) return "At most 300 letters.";
            change("Name", (present) => ({ ...present, name: text }));
            return null;
          }}
        />
      </th>
      <td>
        <CellSelect
          label={`Route of ${name}`}
          value={place}
          options={placeOptions}
          disabled={disabled}
          onChange={(id) => {
            if (id === "own") return;
            change("Route", (present) => ({
              ...present,
              path: null,
              route: id === "" ? null : { id, placeM: present.route?.placeM ?? [0, 0] },
            }));
          }}
        />
      </td>
      <td>
        <CellSelect
          label={`Supply of ${name}`}
          value={kind}
          options={supplyOptions}
          disabled={disabled}
          onChange={(next) => {
            setKind(next);
            change("Supply", (present) => withSupplyKind(present, next));
          }}
        />
      </td>
      <td>
        <CellInput
          label={`Current of ${name}, A`}
          value={currentA === null ? "" : numberText(currentA)}
          numeric
          placeholder={isUnbalanced ? "by phase" : "not known"}
          disabled={disabled || isUnbalanced}
          onCommit={(text) => {
            if (text.trim() === "") return change("Current", (present) => ({ ...present, supply: null }));
            return number(text, kind === "dc" ? -1e6 : 0, (typedA) =>
              change("Current", (present) =>
                present.supply === null
                  ? withSupply(present, withCurrent(supplyOf(kind, null), typedA))
                  : { ...present, supply: withCurrent(present.supply, typedA) },
              ),
            );
          }}
        />
      </td>
      <td>
        {supply !== null && supply.kind !== "dc" ? (
          <CellInput
            label={`Frequency of ${name}, Hz`}
            value={numberText(supply.frequencyHz)}
            numeric
            disabled={disabled}
            onCommit={(text) =>
              number(text, 1e-3, (frequencyHz) =>
                change("Frequency", (present) => ({ ...present, supply: { ...supply, frequencyHz } })),
              )
            }
          />
        ) : (
          <span className="text-muted">none</span>
        )}
      </td>
      <td>
        <CellSelect
          label={`Basis of the current of ${name}`}
          value={circuit.currentBasis}
          options={basisOptions}
          disabled={disabled}
          onChange={(currentBasis) => change("Basis", (present) => ({ ...present, currentBasis }))}
        />
      </td>
      <td>
        <CellSelect
          label={`Arrangement of ${name}`}
          value={arrangement.kind}
          options={fittingKinds(circuit).map((value) => ({ value, label: arrangementTitles[value] }))}
          disabled={disabled}
          onChange={(chosen) => change("Arrangement", (present) => rearranged(present, chosen))}
        />
      </td>
      <td>
        {"spacingM" in arrangement ? (
          <CellInput
            label={`Spacing of ${name}, mm`}
            value={numberText(arrangement.spacingM * 1000)}
            numeric
            disabled={disabled}
            onCommit={(text) => {
              const leastMm = circuit.conductorRadiusM * 2000;
              const spacingMm = readNumber(text);
              if (spacingMm === null || spacingMm < leastMm || spacingMm > 1e5)
                return `At least ${numberText(leastMm)} mm, twice the radius.`;
              return change("Spacing", (present) => ({
                ...present,
                arrangement: { ...arrangement, spacingM: spacingMm / 1000 },
              }));
            }}
          />
        ) : (
          <span className="text-muted">none</span>
        )}
      </td>
      <td>
        <CellInput
          label={`Conductor radius of ${name}, mm`}
          value={numberText(circuit.conductorRadiusM * 1000)}
          numeric
          disabled={disabled}
          onCommit={(text) => {
            const radiusMm = readNumber(text);
            const mostMm = "spacingM" in arrangement ? arrangement.spacingM * 500 : 1000;
            if (radiusMm === null || radiusMm <= 0 || radiusMm > mostMm)
              return `Above 0, up to ${numberText(mostMm)} mm.`;
            return change("Conductor radius", (present) => ({
              ...present,
              conductorRadiusM: radiusMm / 1000,
            }));
          }}
        />
      </td>
      {!disabled && (
        <td>
          <Button
            small
            kind="quiet"
            aria-label={`Delete circuit ${name}`}
            onClick={() => store.edit(`Delete ${name}`, (whole) => removeCircuits(whole, [circuit.id]))}
          >
            Delete
          </Button>
        </td>
      )}
    </tr>
  );
}
