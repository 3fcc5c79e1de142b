import { Button } from "~/components/ui/Button";
import type { Background, Sensor } from "~/domain/plan-document/sensor";
import { blankBackground, knownAs, staticOfKind, type StaticKnown } from "~/sheet/edits/background";
import { numberText, readNumber } from "~/sheet/read-number";
import { Choice } from "../inputs/Choice";
import { CommitField } from "../inputs/CommitField";
import { NumberField } from "../inputs/NumberField";
import { CellInput } from "../tables/CellInput";
import type { ChangeSensor } from "./changes";

interface Props {
  sensor: Sensor;
  change: ChangeSensor;
  disabled: boolean;
}

/** What was measured at the place before anything drawn carries current. */
export function BackgroundFields({ sensor, change, disabled }: Props) {
  const { background } = sensor;
  const set = (next: Background | null) =>
    change("Background", (present) => ({ ...present, background: next }));
  if (background === null) {
    return disabled ? null : (
      <Button small className="justify-self-start" onClick={() => set(blankBackground)}>
        Add a measured background
      </Button>
    );
  }
  return (
    <fieldset className="grid gap-3">
      <legend className="mb-1 text-sm font-semibold">Measured background</legend>
      <StaticFields background={background} set={set} disabled={disabled} />
      <AlternatingTable background={background} set={set} disabled={disabled} />
      <NumberField
        label="Expanded uncertainty of the readings"
        unit="µT"
        perUnit={1e6}
        least={0}
        most={1}
        value={background.expandedUncertaintyT}
        disabled={disabled}
        onChange={(expandedUncertaintyT) => set({ ...background, expandedUncertaintyT })}
      />
      <CommitField
        label="Note"
        value={background.note}
        hint="When, with what, in which state of the load."
        disabled={disabled}
        onCommit={(note) => {
          if (note.length > 2000) return "At most 2000 letters.";
          set({ ...background, note });
          return null;
        }}
      />
      {!disabled && (
        <Button small kind="quiet" className="justify-self-start" onClick={() => set(null)}>
          Take the background out
        </Button>
      )}
    </fieldset>
  );
}

interface PartProps {
  background: Background;
  set: (next: Background) => void;
  disabled: boolean;
}

const knownOptions: readonly { value: StaticKnown; label: string }[] = [
  { value: "none", label: "not measured" },
  { value: "magnitude", label: "magnitude only" },
  { value: "vector", label: "all three parts" },
];

function StaticFields({ background, set, disabled }: PartProps) {
  const { staticT } = background;
  return (
    <div className="grid grid-cols-3 gap-3">
      <div className="col-span-3">
        <Choice
          label="Static (DC)"
          value={knownAs(staticT)}
          options={knownOptions}
          disabled={disabled}
          onChange={(kind) => set({ ...background, staticT: staticOfKind(kind, staticT) })}
        />
      </div>
      {typeof staticT === "number" && (
        <NumberField
          label="Magnitude"
          unit="µT"
          perUnit={1e6}
          least={0}
          most={1}
          value={staticT}
          disabled={disabled}
          onChange={(valueT) => set({ ...background, staticT: valueT })}
        />
      )}
      {Array.isArray(staticT) &&
        (["x", "y", "z"] as const).map((axis, at) => (
          <NumberField
            key={axis}
            label={`along ${axis}`}
            unit="µT"
            perUnit={1e6}
            least={-1}
            most={1}
            value={staticT[at] ?? 0}
            disabled={disabled}
            onChange={(valueT) =>
              set({
                ...background,
                staticT: staticT.map((old, i) => (i === at ? valueT : old)) as [number, number, number],
              })
            }
          />
        ))}
    </div>
  );
}

function AlternatingTable({ background, set, disabled }: PartProps) {
  const { alternating } = background;
  const change = (index: number, part: Partial<(typeof alternating)[number]>) =>
    set({
      ...background,
      alternating: alternating.map((row, i) => (i === index ? { ...row, ...part } : row)),
    });
  return (
    <>
      {alternating.length > 0 && (
        <table className="table">
          <caption className="sr-only">Alternating background</caption>
          <thead>
            <tr>
              <th scope="col">Frequency, Hz</th>
              <th scope="col">Field, µT rms</th>
              {!disabled && (
                <th scope="col">
                  <span className="sr-only">Delete</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {alternating.map(({ frequencyHz, rmsT }, index) => (
              <tr key={index}>
                <td>
                  <CellInput
                    label={`Frequency ${index + 1} of the background, Hz`}
                    value={numberText(frequencyHz)}
                    numeric
                    disabled={disabled}
                    onCommit={(text) => {
                      const typed = readNumber(text);
                      if (typed === null || typed <= 0 || typed > 1e9) return "Hertz above 0.";
                      change(index, { frequencyHz: typed });
                      return null;
                    }}
                  />
                </td>
                <td>
                  <CellInput
                    label={`Field ${index + 1} of the background, microtesla rms`}
                    value={numberText(rmsT * 1e6)}
                    numeric
                    disabled={disabled}
                    onCommit={(text) => {
                      const typed = readNumber(text);
                      if (typed === null || typed < 0 || typed > 1e6) return "Microtesla from 0 up.";
                      change(index, { rmsT: Number((typed / 1e6).toPrecision(12)) });
                      return null;
                    }}
                  />
                </td>
                {!disabled && (
                  <td>
                    <Button
                      small
                      kind="quiet"
                      aria-label={`Delete background at ${frequencyHz} Hz`}
                      onClick={() =>
                        set({ ...background, alternating: alternating.filter((_, i) => i !== index) })
                      }
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
      {!disabled && alternating.length < 100 && (
        <Button
          small
          className="justify-self-start"
          onClick={() => set({ ...background, alternating: [...alternating, { frequencyHz: 50, rmsT: 0 }] })}
        >
          Add an alternating reading
        </Button>
      )}
    </>
  );
}
