import { isSingle } from "~/domain/plan-document/arrangement-fits";
import { CURRENT_TOLERANCE_PERCENT, type Circuit } from "~/domain/plan-document/circuit";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import type { ChangeCircuit } from "./changes";
import { groupProblem, SourceFields } from "./SourceFields";

interface Props {
  circuit: Circuit;
  change: ChangeCircuit;
  disabled: boolean;
}

/** How well a circuit's current and place are known, and what feeds it. */
export function ToleranceFields({ circuit, change, disabled }: Props) {
  const byBasis = CURRENT_TOLERANCE_PERCENT[circuit.currentBasis];
  return (
    <>
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
        <NumberField
          label="Tolerance of the spacing"
          unit="%"
          least={0}
          most={1000}
          value={circuit.spacingTolerancePercent}
          disabled={disabled}
          onChange={(spacingTolerancePercent) =>
            change("Tolerance of the spacing", (present) => ({ ...present, spacingTolerancePercent }))
          }
        />
        <CommitField
          label="Load group"
          value={circuit.loadGroup ?? ""}
          placeholder="on its own"
          hint="Circuits of one group vary together."
          disabled={disabled}
          onCommit={(text) => {
            const problem = groupProblem(text);
            const loadGroup = text.trim() === "" ? null : text.trim();
            return problem ?? change("Load group", (present) => ({ ...present, loadGroup }));
          }}
        />
      </div>
      {!isSingle(circuit.arrangement) && (
        <StrayFields circuit={circuit} change={change} disabled={disabled} />
      )}
      <SourceFields
        source={circuit.source}
        shieldingFactor={circuit.shieldingFactor}
        disabled={disabled}
        onSource={(source) => void change("Source", (present) => ({ ...present, source }))}
        onShielding={(shieldingFactor) =>
          void change("Shielding factor", (present) => ({ ...present, shieldingFactor }))
        }
      />
    </>
  );
}

/** Current that goes out with the circuit and comes back some other way. */
function StrayFields({ circuit, change, disabled }: Props) {
  const isKnown = circuit.strayCurrentA !== null;
  return (
    <fieldset className="grid grid-cols-2 gap-3">
      <legend className="mb-1 text-sm font-semibold">Stray current</legend>
      <NumberField
        label="Current"
        unit="A"
        least={-1e6}
        most={1e6}
        value={circuit.strayCurrentA}
        placeholder="not known"
        hint="Empty: not known."
        disabled={disabled}
        onEmpty={() =>
          change("Stray current", (present) => ({ ...present, strayCurrentA: null, strayAngleDeg: 0 }))
        }
        onChange={(strayCurrentA) => change("Stray current", (present) => ({ ...present, strayCurrentA }))}
      />
      <NumberField
        label="Its bound, ±"
        unit="A"
        least={0}
        most={1e6}
        value={circuit.strayToleranceA}
        placeholder={isKnown ? "0" : "1 % by rule"}
        hint={isKnown ? "Empty: known exactly." : "Empty: 1 % of the current is allowed for."}
        disabled={disabled}
        onEmpty={() =>
          change("Bound of the stray current", (present) => ({ ...present, strayToleranceA: null }))
        }
        onChange={(strayToleranceA) =>
          change("Bound of the stray current", (present) => ({ ...present, strayToleranceA }))
        }
      />
      {isKnown && circuit.supply !== null && circuit.supply.kind !== "dc" && (
        <NumberField
          label="Its angle"
          unit="°"
          least={-3600}
          most={3600}
          value={circuit.strayAngleDeg}
          disabled={disabled}
          onChange={(strayAngleDeg) =>
            change("Angle of the stray current", (present) => ({ ...present, strayAngleDeg }))
          }
        />
      )}
    </fieldset>
  );
}
