import { Group, Rect, Text } from "react-konva";
import type { OwnedPath } from "~/sheet/edits/paths";
import type { Selection } from "~/sheet/selection";
import type { Palette } from "./use-palette";

interface Props {
  owned: OwnedPath;
  selection: Selection;
  scale: number;
  palette: Palette;
}

/** Vertices one above the other share one handle; its label lists their heights. */
function stacked(
  path: OwnedPath["path"],
): { at: readonly [number, number]; heights: number[]; indices: number[] }[] {
  const stacks: { at: readonly [number, number]; heights: number[]; indices: number[] }[] = [];
  path.forEach(([x, y, z], index) => {
    const last = stacks.at(-1);
    if (last !== undefined && Math.hypot(last.at[0] - x, last.at[1] - y) < 1e-6) {
      last.heights.push(z);
      last.indices.push(index);
    } else stacks.push({ at: [x, y], heights: [z], indices: [index] });
  });
  return stacks;
}

export function VertexHandles({ owned, selection, scale, palette }: Props) {
  const chosen = (index: number): boolean =>
    selection.some(
      (item) => item.kind === "vertex" && item.index === index && item.owner.id === owned.owner.id,
    );
  return stacked(owned.path).map(({ at, heights, indices }) => {
    const selected = indices.some(chosen);
    return (
      <Group key={indices[0]} x={at[0]} y={at[1]} scaleX={1 / scale} scaleY={-1 / scale} listening={false}>
        <Rect
          x={-5}
          y={-5}
          width={10}
          height={10}
          fill={selected ? palette.accent : palette.paper}
          stroke={palette.accent}
          strokeWidth={2}
        />
        <Text
          x={9}
          y={-19}
          text={`${heights.map((heightM) => heightM.toFixed(2)).join(" → ")} m`}
          fontSize={13}
          fontFamily="Source Sans 3"
          fill={palette.ink}
          stroke={palette.paper}
          strokeWidth={3}
          fillAfterStrokeEnabled
        />
      </Group>
    );
  });
}
