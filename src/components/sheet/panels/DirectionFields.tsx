import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";

type Direction = [number, number, number];

const presets = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] } as const;
type Preset = "none" | keyof typeof presets | "own";

const labels: Record<Exclude<Preset, "none">, string> = {
  x: "x, to the right of the sheet",
  y: "y, up the sheet",
  z: "z, upright",
  own: "a direction of its own",
};

const presetOf = (direction: Readonly<Direction> | null): Preset => {
  if (direction === null) return "none";
  const found = (["x", "y", "z"] as const).find((name) =>
    presets[name].every((value, i) => value === direction[i]),
  );
  return found ?? "own";
};

interface Props {
  label: string;
  direction: Readonly<Direction> | null;
  /** What it means to have none; left out where there has to be one. */
  noneLabel?: string | undefined;
  hint?: string | undefined;
  disabled: boolean;
  onChange: (direction: Direction | null) => void;
}

/** A direction in the plan: along an axis of the sheet or by its three parts. */
export function DirectionFields({ label, direction, noneLabel, hint, disabled, onChange }: Props) {
  const preset = presetOf(direction);
  const own = Object.entries(labels) as [Preset, string][];
  const options = [...(noneLabel === undefined ? [] : [["none", noneLabel] as const]), ...own];
  return (
    <>
      <Choice
        label={label}
        value={preset}
        options={options.map(([value, text]) => ({ value, label: text }))}
        {...(hint !== undefined && { hint })}
        disabled={disabled}
        onChange={(chosen) => {
          if (chosen === "none") onChange(null);
          else onChange(chosen === "own" ? [1, 1, 0] : [...presets[chosen]]);
        }}
      />
      {preset === "own" && direction !== null && (
        <fieldset className="grid grid-cols-3 gap-3">
          <legend className="mb-1 text-sm font-semibold">Direction, of any length</legend>
          {(["along x", "along y", "along z"] as const).map((part, at) => (
            <NumberField
              key={part}
              label={part}
              value={direction[at] ?? 0}
              disabled={disabled}
              onChange={(value) => {
                const next = direction.map((old, i) => (i === at ? value : old)) as Direction;
                if (Math.hypot(...next) > 1e-9) onChange(next);
              }}
            />
          ))}
        </fieldset>
      )}
    </>
  );
}
