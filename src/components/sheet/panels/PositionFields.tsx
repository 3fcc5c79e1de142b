import type { Point3 } from "~/sheet/geometry";
import { NumberField } from "../inputs/NumberField";

interface Props {
  legend: string;
  position: Point3;
  disabled: boolean;
  onChange: (position: [number, number, number]) => void;
}

/** A place in the plan frame, metres. */
export function PositionFields({ legend, position, disabled, onChange }: Props) {
  return (
    <fieldset className="grid grid-cols-3 gap-3">
      <legend className="mb-1 text-sm font-semibold">{legend}</legend>
      {(["x", "y", "z, height"] as const).map((label, at) => (
        <NumberField
          key={label}
          label={label}
          unit="m"
          least={-100_000}
          most={100_000}
          value={position[at] ?? 0}
          disabled={disabled}
          onChange={(valueM) =>
            onChange(position.map((old, i) => (i === at ? valueM : old)) as [number, number, number])
          }
        />
      ))}
    </fieldset>
  );
}
