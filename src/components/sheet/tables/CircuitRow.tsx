import { Button } from "~/components/ui/Button";
import type { Circuit } from "~/domain/plan-document/circuit";
import {
  arrangementOf,
  fitsSupply,
  offeredArrangements,
  supplyOf,
  updateCircuit,
  withSupply,
} from "~/sheet/edits/circuits";
import { removeCircuits } from "~/sheet/edits/remove";
import { numberText, readNumber } from "~/sheet/read-number";
import { basisOptions } from "../panels/basis";
import { balancedCurrentA, supplyOptions, withCurrent } from "../panels/SupplyFields";
import { useDocument, useEditable, useSheetStore } from "../store";
import { CellInput } from "./CellInput";
import { CellSelect } from "./CellSelect";

/** One circuit, each figure an edit of its own. */
export function CircuitRow({ circuit }: { circuit: Circuit }) {
  const store = useSheetStore();
  const disabled = !useEditable();
  const { routes } = useDocument();
  const { name, supply, arrangement } = circuit;
  const change = (label: string, how: (present: Circuit) => Circuit) =>
    store.edit(`${label} of ${name}`, (whole) => updateCircuit(whole, circuit.id, how));
  const number = (text: string, least: number, take: (value: number) => void): string | null => {
    const value = readNumber(text);
    if (value === null) return "Type a number.";
    if (value < least) return `At least ${numberText(least)}.`;
    if (value > 1e6) return "At most a million.";
    take(value);
    return null;
  };
  const place = circuit.route?.id ?? (circuit.path === null ? "" : "own");
  const placeOptions = [
    { value: "", label: "not traced" },
    ...(circuit.path === null ? [] : [{ value: "own", label: "a path of its own" }]),
    ...routes.map((route) => ({ value: route.id, label: route.name })),
  ];
  const kind = supply?.kind ?? "";
  const arrangements = offeredArrangements.filter(
    (entry) => supply === null || fitsSupply(entry.kind, supply.kind),
  );
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
          options={[{ value: "", label: "not known" }, ...supplyOptions]}
          disabled={disabled}
          onChange={(next) =>
            change("Supply", (present) =>
              withSupply(present, next === "" ? null : supplyOf(next, present.supply)),
            )
          }
        />
      </td>
      <td>
        <CellInput
          label={`Current of ${name}, A`}
          value={supply === null ? "" : numberText(balancedCurrentA(supply) ?? 0)}
          numeric
          placeholder="not known"
          disabled={disabled || (supply?.kind === "ac3" && supply.phases !== undefined)}
          onCommit={(text) => {
            if (text.trim() === "") {
              change("Current", (present) => ({ ...present, supply: null }));
              return null;
            }
            const isDc =
              supply === null
                ? arrangement.kind === "pair" || arrangement.kind === "single"
                : supply.kind === "dc";
            return number(text, isDc ? -1e6 : 0, (currentA) =>
              change("Current", (present) =>
                withSupply(
                  present,
                  withCurrent(present.supply ?? supplyOf(isDc ? "dc" : "ac3", null), currentA),
                ),
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
          options={[
            ...arrangements.map((entry) => ({ value: entry.kind as string, label: entry.label as string })),
            ...(arrangements.some((entry) => entry.kind === arrangement.kind)
              ? []
              : [{ value: arrangement.kind as string, label: arrangement.kind as string }]),
          ]}
          disabled={disabled}
          onChange={(chosen) => {
            const offered = offeredArrangements.find((entry) => entry.kind === chosen);
            if (offered !== undefined)
              change("Arrangement", (present) => ({
                ...present,
                arrangement: arrangementOf(offered.kind, present.arrangement),
              }));
          }}
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
              const refused = number(text, circuit.conductorRadiusM * 2000, (spacingMm) =>
                change("Spacing", (present) => ({
                  ...present,
                  arrangement: { ...arrangement, spacingM: spacingMm / 1000 },
                })),
              );
              return (
                refused && `At least ${numberText(circuit.conductorRadiusM * 2000)} mm, twice the radius.`
              );
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
            change("Conductor radius", (present) => ({ ...present, conductorRadiusM: radiusMm / 1000 }));
            return null;
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
