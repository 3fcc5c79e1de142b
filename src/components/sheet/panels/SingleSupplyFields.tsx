import type { SingleSupply } from "~/domain/plan-document/supply";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import { HarmonicsFields } from "./HarmonicsFields";

interface Props {
  of: string;
  supply: SingleSupply;
  disabled: boolean;
  onChange: (supply: SingleSupply) => void;
}

const toKind = (kind: SingleSupply["kind"], { currentA }: SingleSupply): SingleSupply =>
  kind === "dc"
    ? { kind, currentA }
    : { kind, currentA: Math.abs(currentA), frequencyHz: 50, phaseDeg: 0, harmonics: [] };

/** What flows in each turn of a coil or toroid. */
export function SingleSupplyFields({ of, supply, disabled, onChange }: Props) {
  return (
    <>
      <div className="grid grid-cols-2 gap-3">
        <Choice
          label="Supply"
          value={supply.kind}
          options={[
            { value: "dc", label: "DC" },
            { value: "ac1", label: "AC, one phase" },
          ]}
          disabled={disabled}
          onChange={(kind) => {
            if (kind !== supply.kind) onChange(toKind(kind, supply));
          }}
        />
        <NumberField
          label={supply.kind === "dc" ? "Current, with its sign" : "Current, rms"}
          unit="A"
          least={supply.kind === "dc" ? -1e6 : 0}
          most={1e6}
          value={supply.currentA}
          disabled={disabled}
          onChange={(currentA) => onChange({ ...supply, currentA })}
        />
        {supply.kind === "ac1" && (
          <>
            <NumberField
              label="Frequency"
              unit="Hz"
              above={0}
              most={1e6}
              value={supply.frequencyHz}
              disabled={disabled}
              onChange={(frequencyHz) => onChange({ ...supply, frequencyHz })}
            />
            <NumberField
              label="Phase"
              unit="°"
              least={-3600}
              most={3600}
              value={supply.phaseDeg}
              disabled={disabled}
              onChange={(phaseDeg) => onChange({ ...supply, phaseDeg })}
            />
          </>
        )}
      </div>
      {supply.kind === "ac1" && (
        <HarmonicsFields
          of={of}
          frequencyHz={supply.frequencyHz}
          harmonics={supply.harmonics}
          disabled={disabled}
          onChange={(harmonics) => onChange({ ...supply, harmonics })}
        />
      )}
    </>
  );
}
