import { readNumber } from "~/sheet/read-number";
import type { Point3 } from "~/sheet/geometry";
import { CellInput } from "./CellInput";

interface Props {
  name: string;
  position: Point3;
  disabled: boolean;
  onChange: (position: [number, number, number]) => void;
}

export const positionColumns = ["x, m", "y, m", "z, m"] as const;

/** Three cells with a place in the plan frame, metres. */
export function PositionCells({ name, position, disabled, onChange }: Props) {
  return (["x", "y", "z"] as const).map((axis, at) => (
    <td key={axis}>
      <CellInput
        label={`${axis} of ${name}, m`}
        value={String(position[at])}
        numeric
        disabled={disabled}
        onCommit={(text) => {
          const valueM = readNumber(text);
          if (valueM === null || Math.abs(valueM) > 100_000) return "Type metres.";
          onChange(position.map((old, i) => (i === at ? valueM : old)) as [number, number, number]);
          return null;
        }}
      />
    </td>
  ));
}
