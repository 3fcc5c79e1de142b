import type { Sensor } from "~/domain/plan-document/sensor";
import { Choice } from "../inputs/Choice";
import { NumberField } from "../inputs/NumberField";
import type { ChangeSensor } from "./changes";

const presets = {
  none: null,
  x: [1, 0, 0],
  y: [0, 1, 0],
  z: [0, 0, 1],
} as const;

type Preset = keyof typeof presets | "own";

const labels: Record<Preset, string> = {
  none: "none: the whole field counts",
  x: "x, to the right of the sheet",
  y: "y, up the sheet",
  z: "z, upright",
  own: "a direction of its own",
};

const presetOf = (axis: Sensor["axis"]): Preset => {
  if (axis === null) return "none";
  const found = (["x", "y", "z"] as const).find((name) =>
    presets[name].every((value, i) => value === axis[i]),
  );
  return found ?? "own";
};

interface Props {
  sensor: Sensor;
  change: ChangeSensor;
  disabled: boolean;
}

/** The direction along which a sensor measures; without one the resultant counts. */
export function AxisFields({ sensor, change, disabled }: Props) {
  const preset = presetOf(sensor.axis);
  const { axis } = sensor;
  return (
    <>
      <Choice
        label="Axis"
        value={preset}
        options={(Object.keys(labels) as Preset[]).map((value) => ({ value, label: labels[value] }))}
        disabled={disabled}
        onChange={(chosen) => {
          const next = chosen === "own" ? ([1, 1, 0] as const) : presets[chosen];
          change("Axis", (present) => ({ ...present, axis: next === null ? null : [...next] }));
        }}
      />
      {preset === "own" && axis !== null && (
        <fieldset className="grid grid-cols-3 gap-3">
          <legend className="mb-1 text-sm font-semibold">Direction, of any length</legend>
          {(["along x", "along y", "along z"] as const).map((label, at) => (
            <NumberField
              key={label}
              label={label}
              value={axis[at] ?? 0}
              disabled={disabled}
              onChange={(value) => {
                const next = axis.map((old, i) => (i === at ? value : old)) as [number, number, number];
                if (Math.hypot(...next) > 0) change("Axis", (present) => ({ ...present, axis: next }));
              }}
            />
          ))}
        </fieldset>
      )}
    </>
  );
}
