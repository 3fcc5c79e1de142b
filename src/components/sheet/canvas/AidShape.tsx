import { memo } from "react";
import { Group, Line, Path, Text } from "react-konva";
import { isClosed, type Aid, type AidKind } from "~/sheet/edits/aids";
import type { Palette } from "./use-palette";

interface Props {
  aid: Aid;
  scale: number;
  palette: Palette;
  selected: boolean;
}

/** Dashes by kind, px: a section's dash and dots, a zone's long dashes, a loop's short ones. */
const dashes: Record<AidKind, number[]> = {
  datum: [],
  mark: [],
  zone: [14, 6],
  loop: [4, 4],
  "section-line": [16, 4, 3, 4],
};

const symbols: Partial<Record<AidKind, string>> = {
  datum: "M-11 0H11M0 -11V11M-6 -6H6V6H-6Z",
  mark: "M-7 -7L7 7M-7 7L7 -7",
};

/** What people work by: fine lines in ink with their names, so that nothing takes them for cables. */
export const AidShape = memo(function AidShape({ aid, scale, palette, selected }: Props) {
  const { kind, points, name } = aid;
  const [first] = points;
  if (first === undefined) return null;
  const colour = selected ? palette.accent : palette.muted;
  const symbol = symbols[kind];
  return (
    <>
      {points.length > 1 && (
        <Line
          points={points.flatMap(([x, y]) => [x, y])}
          closed={isClosed(kind)}
          stroke={colour}
          strokeWidth={selected ? 2.5 : 1.5}
          dash={dashes[kind]}
          strokeScaleEnabled={false}
        />
      )}
      <Group x={first[0]} y={first[1]} scaleX={1 / scale} scaleY={-1 / scale}>
        {symbol !== undefined && <Path data={symbol} stroke={colour} strokeWidth={selected ? 2.5 : 1.75} />}
        <Text
          x={12}
          y={-20}
          text={name}
          fontSize={13}
          fontFamily="Source Sans 3"
          fill={palette.ink}
          stroke={palette.paper}
          strokeWidth={3.5}
          fillAfterStrokeEnabled
        />
      </Group>
    </>
  );
});
