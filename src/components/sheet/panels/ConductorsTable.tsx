import { useId, useState } from "react";
import { Button } from "~/components/ui/Button";
import type { Arrangement, Carrier } from "~/domain/plan-document/arrangement";
import type { Circuit } from "~/domain/plan-document/circuit";
import { numberText, readNumber } from "~/sheet/read-number";
import { useSheetStore } from "../store";
import { CellSelect } from "../tables/CellSelect";
import type { ChangeCircuit } from "./changes";

type Custom = Extract<Arrangement, { kind: "custom" }>;

interface Row {
  right: string;
  up: string;
  of: Carrier;
  fraction: string;
}

const figures = [
  { key: "right", label: "To the right, mm" },
  { key: "up", label: "Up, mm" },
  { key: "fraction", label: "Share" },
] as const;

const rowOf = ({ offsetM, of, fraction }: Custom["conductors"][number]): Row => ({
  right: numberText(offsetM[0] * 1000),
  up: numberText(offsetM[1] * 1000),
  of,
  fraction: numberText(fraction),
});

function conductorsOf(rows: readonly Row[]): Custom["conductors"] | null {
  const conductors = rows.map(({ right, up, of, fraction }) => ({
    offsetM: [
      Number(((readNumber(right) ?? NaN) / 1000).toPrecision(12)),
      Number(((readNumber(up) ?? NaN) / 1000).toPrecision(12)),
    ] as [number, number],
    of,
    fraction: readNumber(fraction) ?? NaN,
  }));
  const sound = conductors.every(
    ({ offsetM, fraction }) =>
      offsetM.every((valueM) => Math.abs(valueM) <= 100) && fraction >= 0 && fraction <= 1,
  );
  return sound ? conductors : null;
}

interface Props {
  circuit: Circuit;
  arrangement: Custom;
  change: ChangeCircuit;
  disabled: boolean;
}

/** Conductors one by one; they take effect together, since shares of a carrier add up to one. */
export function ConductorsTable({ circuit, arrangement, change, disabled }: Props) {
  const id = useId();
  const { phaseLabels } = useSheetStore();
  const [rows, setRows] = useState(() => arrangement.conductors.map(rowOf));
  const [problem, setProblem] = useState<string | null>(null);
  const carriers: readonly { value: Carrier; label: string }[] = [
    { value: "go", label: "go" },
    { value: "return", label: "return" },
    ...(["a", "b", "c"] as const).map((value, i) => ({ value, label: phaseLabels[i] ?? value })),
    { value: "n", label: "N" },
  ];
  const set = (index: number, part: Partial<Row>) =>
    setRows(rows.map((row, i) => (i === index ? { ...row, ...part } : row)));
  const apply = () => {
    const conductors = conductorsOf(rows);
    setProblem(
      conductors === null
        ? "Type millimetres from the centre line, and shares from 0 to 1."
        : change("Conductors", (present) => ({ ...present, arrangement: { ...arrangement, conductors } })),
    );
  };
  return (
    <form
      className="grid gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        apply();
      }}
    >
      <div className="table-scroll">
        <table className="table">
          <caption className="sr-only">
            Conductors of {circuit.name}, from the centre line, seen along the route
          </caption>
          <thead>
            <tr>
              <th scope="col">no.</th>
              <th scope="col">Carries</th>
              {figures.map(({ key, label }) => (
                <th key={key} scope="col">
                  {label}
                </th>
              ))}
              {!disabled && (
                <th scope="col">
                  <span className="sr-only">Delete</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {rows.map((row, index) => (
              <tr key={index}>
                <th scope="row">{index + 1}</th>
                <td>
                  <CellSelect
                    label={`What conductor ${index + 1} carries`}
                    value={row.of}
                    options={carriers}
                    disabled={disabled}
                    onChange={(of) => set(index, { of })}
                  />
                </td>
                {figures.map(({ key, label }) => (
                  <td key={key}>
                    <input
                      className="input input-small w-16 text-right"
                      aria-label={`${label} of conductor ${index + 1}`}
                      aria-describedby={`${id}-problem`}
                      inputMode="decimal"
                      autoComplete="off"
                      disabled={disabled}
                      value={row[key]}
                      onChange={(event) => set(index, { [key]: event.target.value })}
                    />
                  </td>
                ))}
                {!disabled && (
                  <td>
                    <Button
                      small
                      kind="quiet"
                      disabled={rows.length === 1}
                      aria-label={`Delete conductor ${index + 1}`}
                      onClick={() => setRows(rows.filter((_, i) => i !== index))}
                    >
                      Delete
                    </Button>
                  </td>
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <p id={`${id}-problem`} role="alert" className="field-error">
        {problem}
      </p>
      {!disabled && (
        <div className="flex flex-wrap gap-2">
          <Button
            small
            disabled={rows.length >= 200}
            onClick={() =>
              setRows([...rows, { right: "0", up: "0", of: rows.at(-1)?.of ?? "go", fraction: "1" }])
            }
          >
            Add a conductor
          </Button>
          <Button small type="submit">
            Take these conductors
          </Button>
        </div>
      )}
    </form>
  );
}
