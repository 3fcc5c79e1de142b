import { useState } from "react";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { Supply } from "~/domain/plan-document/supply";
import { wayBack } from "~/domain/plan-document/arrangement-fits";
import {
  balancedCurrentA,
  supplyOf,
  usualSupplyKind,
  withCurrent,
  withSupply,
  withSupplyKind,
} from "~/sheet/edits/circuits";
import { fitsSupply } from "~/sheet/edits/arrangements";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import { basisOptions } from "./basis";
import type { ChangeCircuit } from "./changes";
import { HarmonicsFields } from "./HarmonicsFields";
import { PhasesFields } from "./PhasesFields";

export const supplyOptions: readonly { value: Supply["kind"]; label: string }[] = [
  { value: "dc", label: "DC" },
  { value: "ac1", label: "AC, one phase" },
  { value: "ac3", label: "AC, three phases" },
];

/** The kind of supply that shows: while the current is not known, the one chosen here if the arrangement carries it. */
export function useSupplyKind(circuit: Circuit): [Supply["kind"], (kind: Supply["kind"]) => void] {
  const [chosen, setChosen] = useState<Supply["kind"] | null>(null);
  const waiting =
    chosen !== null && fitsSupply(circuit, supplyOf(chosen, null)) ? chosen : usualSupplyKind(circuit);
  return [circuit.supply?.kind ?? waiting, setChosen];
}

interface Props {
  circuit: Circuit;
  change: ChangeCircuit;
  disabled: boolean;
}

/** What flows in the circuit; an empty current is a load not known yet. */
export function SupplyFields({ circuit, change, disabled }: Props) {
  const { supply } = circuit;
  const [kind, setKind] = useSupplyKind(circuit);
  const isUnbalanced = supply?.kind === "ac3" && supply.phases !== undefined;
  return (
    <>
      <div className="grid grid-cols-2 gap-3">
        <Choice
          label="Supply"
          value={kind}
          options={supplyOptions}
          disabled={disabled}
          onChange={(next) => {
            setKind(next);
            change("Supply", (present) => withSupplyKind(present, next));
          }}
        />
        <NumberField
          label={kind === "dc" ? "Current, with its sign" : "Current, rms"}
          unit="A"
          least={kind === "dc" ? -1e6 : 0}
          most={1e6}
          value={balancedCurrentA(supply)}
          placeholder={isUnbalanced ? "by phase" : "not known"}
          disabled={disabled || isUnbalanced}
          onEmpty={() => change("Current", (present) => ({ ...present, supply: null }))}
          onChange={(currentA) =>
            change("Current", (present) =>
              present.supply === null
                ? withSupply(present, withCurrent(supplyOf(kind, null), currentA))
                : { ...present, supply: withCurrent(present.supply, currentA) },
            )
          }
        />
        {supply !== null && supply.kind !== "dc" && (
          <>
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
            <NumberField
              label="Phase, all turned by"
              unit="°"
              least={-3600}
              most={3600}
              value={supply.phaseDeg}
              disabled={disabled}
              onChange={(phaseDeg) =>
                change("Phase", (present) => ({ ...present, supply: { ...supply, phaseDeg } }))
              }
            />
          </>
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
      {supply?.kind === "ac3" && (
        <PhasesFields circuit={circuit} supply={supply} change={change} disabled={disabled} />
      )}
      {supply !== null && supply.kind !== "dc" && (
        <HarmonicsFields
          of={circuit.name}
          frequencyHz={supply.frequencyHz}
          harmonics={supply.harmonics}
          withoutTriples={supply.kind === "ac3" && wayBack(circuit.arrangement) === null}
          disabled={disabled}
          onChange={(harmonics) =>
            change("Harmonics", (present) => ({ ...present, supply: { ...supply, harmonics } }))
          }
        />
      )}
    </>
  );
}
