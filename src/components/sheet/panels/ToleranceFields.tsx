import { CURRENT_TOLERANCE_PERCENT, type Circuit } from "~/domain/plan-document/circuit";
import { NumberField } from "../inputs/NumberField";
import type { ChangeCircuit } from "./changes";

/** How well a circuit's current and place are known, and what of it comes back some other way. */
export function ToleranceFields({
  circuit,
  change,
  disabled,
}: {
  circuit: Circuit;
  change: ChangeCircuit;
  disabled: boolean;
}) {
  const byBasis = CURRENT_TOLERANCE_PERCENT[circuit.currentBasis];
  const isSingle = circuit.arrangement.kind === "single";
  return (
    <div className="grid grid-cols-2 gap-3">
      <NumberField
        label="Tolerance of the current"
        unit="%"
        least={0}
        most={1000}
        value={circuit.currentTolerancePercent}
        placeholder={`${byBasis} by basis`}
        hint="Empty: by the basis."
        disabled={disabled}
        onEmpty={() => change("Tolerance", (present) => ({ ...present, currentTolerancePercent: null }))}
        onChange={(currentTolerancePercent) =>
          change("Tolerance", (present) => ({ ...present, currentTolerancePercent }))
        }
      />
      <NumberField
        label="Position tolerance"
        unit="mm"
        perUnit={1000}
        least={0}
        most={100}
        value={circuit.positionToleranceM}
        disabled={disabled}
        onChange={(positionToleranceM) =>
          change("Position tolerance", (present) => ({ ...present, positionToleranceM }))
        }
      />
      {!isSingle && (
        <NumberField
          label="Stray current"
          unit="A"
          least={-1e6}
          most={1e6}
          value={circuit.strayCurrentA}
          placeholder="not known"
          hint="Empty: not known, 1 % of the current is allowed for."
          disabled={disabled}
          onEmpty={() => change("Stray current", (present) => ({ ...present, strayCurrentA: null }))}
          onChange={(strayCurrentA) => change("Stray current", (present) => ({ ...present, strayCurrentA }))}
        />
      )}
    </div>
  );
}
