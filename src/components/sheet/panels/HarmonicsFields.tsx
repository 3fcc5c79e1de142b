import { useState } from "react";
import { Button } from "~/components/ui/Button";
import type { Supply } from "~/domain/plan-document/supply";
import { nextOrder } from "~/sheet/edits/harmonics";
import { readNumber, numberText } from "~/sheet/read-number";
import { refusalOf } from "../inputs/NumberField";
import { CellInput } from "../tables/CellInput";

type Harmonics = Exclude<Supply, { kind: "dc" }>["harmonics"];

interface Props {
  /** What they belong to, for whoever hears the names of the inputs. */
  of: string;
  frequencyHz: number;
  harmonics: Harmonics;
  /** Where nothing carries back what third harmonics add up to. */
  withoutTriples?: boolean;
  disabled: boolean;
  /** Takes them; words in its answer say why they were refused. */
  onChange: (harmonics: Harmonics) => unknown;
}

/** Harmonics of a supply: each order once, as a share of the fundamental. */
export function HarmonicsFields(props: Props) {
  const { of, frequencyHz, harmonics, withoutTriples = false, disabled, onChange } = props;
  const [problem, setProblem] = useState<string | null>(null);
  const set = (index: number, part: Partial<Harmonics[number]>): string | null =>
    refusalOf(onChange(harmonics.map((harmonic, i) => (i === index ? { ...harmonic, ...part } : harmonic))));
  return (
    <fieldset className="grid gap-1">
      <legend className="mb-1 text-sm font-semibold">Harmonics</legend>
      {harmonics.length > 0 && (
        <table className="table">
          <caption className="sr-only">Harmonics of {of}</caption>
          <thead>
            <tr>
              <th scope="col">Order</th>
              <th scope="col">Share, %</th>
              <th scope="col">Angle, °</th>
              {!disabled && (
                <th scope="col">
                  <span className="sr-only">Delete</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {harmonics.map(({ order, percent, angleDeg }, index) => (
              <tr key={order}>
                <td>
                  <CellInput
                    label={`Order of harmonic ${order} of ${of}`}
                    value={String(order)}
                    numeric
                    disabled={disabled}
                    onCommit={(text) => {
                      const typed = readNumber(text);
                      if (typed === null || !Number.isInteger(typed) || typed < 2 || typed > 1000)
                        return "A whole number, 2 to 1000.";
                      if (harmonics.some((other, i) => i !== index && other.order === typed))
                        return "This order is there already.";
                      return set(index, { order: typed });
                    }}
                  />
                </td>
                <td>
                  <CellInput
                    label={`Share of harmonic ${order} of ${of}, %`}
                    value={numberText(percent)}
                    numeric
                    disabled={disabled}
                    onCommit={(text) => {
                      const typed = readNumber(text);
                      if (typed === null || typed < 0 || typed > 1000) return "0 to 1000 %.";
                      return set(index, { percent: typed });
                    }}
                  />
                </td>
                <td>
                  <CellInput
                    label={`Angle of harmonic ${order} of ${of}, degrees`}
                    value={numberText(angleDeg)}
                    numeric
                    disabled={disabled}
                    onCommit={(text) => {
                      const typed = readNumber(text);
                      if (typed === null || Math.abs(typed) > 3600) return "Type degrees.";
                      return set(index, { angleDeg: typed });
                    }}
                  />
                </td>
                {!disabled && (
                  <td>
                    <Button
                      small
                      kind="quiet"
                      aria-label={`Delete harmonic ${order} of ${of}`}
                      onClick={() => onChange(harmonics.filter((_, i) => i !== index))}
                    >
                      Delete
                    </Button>
                  </td>
                )}
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {harmonics.length === 0 && <p className="text-sm text-muted">None: a pure {frequencyHz} Hz.</p>}
      {!disabled && (
        <Button
          small
          className="justify-self-start"
          onClick={() => {
            const order = nextOrder(harmonics, withoutTriples);
            setProblem(refusalOf(onChange([...harmonics, { order, percent: 10, angleDeg: 0 }])));
          }}
        >
          Add a harmonic
        </Button>
      )}
      <p role="alert" className="field-error">
        {problem}
      </p>
    </fieldset>
  );
}
