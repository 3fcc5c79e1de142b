import { useId, useState } from "react";
import { Button } from "~/components/ui/Button";
import type { Circuit } from "~/domain/plan-document/circuit";
import type { Supply } from "~/domain/plan-document/supply";
import { balanced, phasesOf, withPhases, withSumAsStray, type Phases } from "~/sheet/edits/phases";
import { numberText, readNumber } from "~/sheet/read-number";
import { Choice } from "../inputs/Choice";
import { useSheetStore } from "../store";
import type { ChangeCircuit } from "./changes";

type ThreePhase = Extract<Supply, { kind: "ac3" }>;

interface Props {
  circuit: Circuit;
  supply: ThreePhase;
  change: ChangeCircuit;
  disabled: boolean;
}

/** Phases that carry the same current, or each its own. */
export function PhasesFields({ circuit, supply, change, disabled }: Props) {
  const key = JSON.stringify(supply.phases);
  return (
    <>
      <div className="grid grid-cols-2 gap-3">
        <Choice
          label="Phases"
          value={supply.phases === undefined ? "balanced" : "each"}
          options={[
            { value: "balanced", label: "balanced" },
            { value: "each", label: "stated one by one" },
          ]}
          disabled={disabled}
          onChange={(chosen) =>
            change("Phases", (present) => ({
              ...present,
              supply: chosen === "each" ? withPhases(supply, phasesOf(supply)) : balanced(supply),
            }))
          }
        />
        <Choice
          label="Sequence"
          value={supply.sequence}
          options={[
            { value: "abc", label: "abc" },
            { value: "acb", label: "acb: b and c swapped" },
          ]}
          disabled={disabled}
          onChange={(sequence) =>
            change("Sequence", (present) => ({ ...present, supply: { ...supply, sequence } }))
          }
        />
      </div>
      {supply.phases !== undefined && (
        <EachPhase key={key} circuit={circuit} supply={supply} change={change} disabled={disabled} />
      )}
    </>
  );
}

/** Six figures that take effect together: one alone would leave currents that nothing carries back. */
function EachPhase({ circuit, supply, change, disabled }: Props) {
  const id = useId();
  const { phaseLabels } = useSheetStore();
  const [texts, setTexts] = useState(() =>
    phasesOf(supply).map(({ currentA, angleDeg }) => ({
      currentA: numberText(currentA),
      angleDeg: numberText(angleDeg),
    })),
  );
  const [problem, setProblem] = useState<string | null>(null);
  const read = (): Phases | null => {
    const phases = texts.map(({ currentA, angleDeg }) => ({
      currentA: readNumber(currentA) ?? -1,
      angleDeg: readNumber(angleDeg) ?? NaN,
    }));
    const sound = phases.every(
      ({ currentA, angleDeg }) => currentA >= 0 && currentA <= 1e6 && Math.abs(angleDeg) <= 3600,
    );
    return sound ? (phases as Phases) : null;
  };
  const apply = (stray: boolean) => {
    const phases = read();
    if (phases === null) {
      setProblem("Type amperes from 0 up, rms, and degrees.");
      return;
    }
    setProblem(
      change("Phases", (present) => {
        const changed = { ...present, supply: withPhases(supply, phases) };
        return stray ? withSumAsStray(changed) : changed;
      }),
    );
  };
  return (
    <form
      className="grid gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        apply(false);
      }}
    >
      <table className="table">
        <caption className="sr-only">Phases of {circuit.name}</caption>
        <thead>
          <tr>
            <th scope="col">Phase</th>
            <th scope="col">Current, A rms</th>
            <th scope="col">Angle, °</th>
          </tr>
        </thead>
        <tbody>
          {texts.map((row, index) => {
            const label = phaseLabels[index] ?? `L${index + 1}`;
            return (
              <tr key={label}>
                <th scope="row">{label}</th>
                {(["currentA", "angleDeg"] as const).map((figure) => (
                  <td key={figure}>
                    <input
                      className="input input-small min-w-16 text-right"
                      aria-label={`${figure === "currentA" ? "Current" : "Angle"} of ${label}`}
                      aria-describedby={`${id}-problem`}
                      inputMode="decimal"
                      autoComplete="off"
                      disabled={disabled}
                      value={row[figure]}
                      onChange={(event) =>
                        setTexts(
                          texts.map((other, i) =>
                            i === index ? { ...other, [figure]: event.target.value } : other,
                          ),
                        )
                      }
                    />
                  </td>
                ))}
              </tr>
            );
          })}
        </tbody>
      </table>
      <p id={`${id}-problem`} role="alert" className="field-error">
        {problem}
      </p>
      {!disabled && (
        <div className="flex flex-wrap gap-2">
          <Button small type="submit">
            Take these phases
          </Button>
          {problem !== null && read() !== null && (
            <Button small onClick={() => apply(true)}>
              Take them, and their sum as stray current
            </Button>
          )}
        </div>
      )}
    </form>
  );
}
