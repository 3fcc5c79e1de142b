import { useState } from "react";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { Supply } from "~/domain/plan-document/supply";
import { fitsSupply, supplyOf, withSupply } from "~/sheet/edits/circuits";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import { basisOptions } from "./basis";
import type { ChangeCircuit } from "./changes";

export const supplyOptions: readonly { value: Supply["kind"]; label: string }[] = [
  { value: "dc", label: "DC" },
  { value: "ac1", label: "AC, one phase" },
  { value: "ac3", label: "AC, three phases" },
];

/** The figure that the current field edits; null for a supply whose phases are stated one by one. */
export const balancedCurrentA = (supply: Supply | null): number | null =>
  supply === null ? null : (supply.currentA ?? null);

export const withCurrent = (supply: Supply, currentA: number): Supply =>
  supply.kind === "ac3"
    ? ({ ...supplyOf("ac3", supply), frequencyHz: supply.frequencyHz, currentA } as Supply)
    : { ...supply, currentA };

interface Props {
  circuit: Circuit;
  change: ChangeCircuit;
  disabled: boolean;
}

/** What flows in the circuit; an empty current is a load not known yet. */
export function SupplyFields({ circuit, change, disabled }: Props) {
  const { supply } = circuit;
  // While the current is not known the document holds no supply; what is chosen here waits for it.
  const [chosen, setChosen] = useState<Supply["kind"]>("dc");
  const usual = fitsSupply(circuit.arrangement.kind, chosen) ? chosen : "ac3";
  const kind = supply?.kind ?? usual;
  return (
    <div className="grid grid-cols-2 gap-3">
      <Choice
        label="Supply"
        value={kind}
        options={supplyOptions}
        disabled={disabled}
        onChange={(next) => {
          setChosen(next);
          change("Supply", (present) => ({
            ...withSupply(present, supplyOf(next, present.supply)),
            ...(present.supply === null && { supply: null }),
          }));
        }}
      />
      <NumberField
        label={kind === "dc" ? "Current, with its sign" : "Current, rms"}
        unit="A"
        least={kind === "dc" ? -1e6 : 0}
        most={1e6}
        value={balancedCurrentA(supply)}
        placeholder="not known"
        disabled={disabled || (supply?.kind === "ac3" && supply.phases !== undefined)}
        onEmpty={() => change("Current", (present) => ({ ...present, supply: null }))}
        onChange={(currentA) =>
          change("Current", (present) =>
            withSupply(present, withCurrent(present.supply ?? supplyOf(kind, null), currentA)),
          )
        }
      />
      {supply !== null && supply.kind !== "dc" && (
        <NumberField
          label="Frequency"
          unit="Hz"
          above={0}
          most={1e6}
          value={supply.frequencyHz}
          disabled={disabled}
          onChange={(frequencyHz) =>
            change("Frequency", (present) => ({ ...present, supply: { ...supply, frequencyHz } }))
          }
        />
      )}
      <Choice
        label="Basis of the current"
        value={circuit.currentBasis}
        options={basisOptions}
        disabled={disabled}
        onChange={(currentBasis) =>
          change("Basis of the current", (present) => ({ ...present, currentBasis }))
        }
      />
    </div>
  );
}
