import { Circle, Group, Label, Line, Rect, Tag, Text } from "react-konva";
import type { Mark } from "~/sheet/steps/step";
import type { Palette } from "./use-palette";

interface Props {
  marks: readonly Mark[];
  scale: number;
  palette: Palette;
}

function MarkShape({ mark, scale, palette }: { mark: Mark; scale: number; palette: Palette }) {
  const common = { listening: false, strokeScaleEnabled: false } as const;
  if (mark.kind === "line") {
    const points = mark.points.flatMap(([x, y]) => [x, y]);
    return (
      <Line
        {...common}
        points={points}
        stroke={mark.tone === "trace" ? palette.copper : palette.accent}
        strokeWidth={mark.tone === "guide" ? 1.5 : 2.5}
        {...(mark.tone === "guide" && { dash: [6, 4] })}
      />
    );
  }
  if (mark.kind === "box") {
    return (
      <Rect
        {...common}
        x={Math.min(mark.from[0], mark.to[0])}
        y={Math.min(mark.from[1], mark.to[1])}
        width={Math.abs(mark.to[0] - mark.from[0])}
        height={Math.abs(mark.to[1] - mark.from[1])}
        stroke={palette.accent}
        strokeWidth={1.5}
        dash={[5, 4]}
      />
    );
  }
  const [x, y] = mark.at;
  if (mark.kind === "point") {
    return (
      <Circle
        {...common}
        x={x}
        y={y}
        radius={4.5 / scale}
        fill={palette.paper}
        stroke={mark.tone === "trace" ? palette.copper : palette.accent}
        strokeWidth={2}
      />
    );
  }
  if (mark.kind === "ring") {
    return <Circle {...common} x={x} y={y} radius={9 / scale} stroke={palette.accent} strokeWidth={2} />;
  }
  return (
    <Group x={x} y={y} scaleX={1 / scale} scaleY={-1 / scale} listening={false}>
      <Label x={12} y={10}>
        <Tag fill={palette.paper} stroke={palette["rule-strong"]} strokeWidth={1} />
        <Text text={mark.text} padding={4} fontSize={13} fontFamily="Source Sans 3" fill={palette.ink} />
      </Label>
    </Group>
  );
}

/** What the running step draws over the plan. */
export function Marks({ marks, scale, palette }: Props) {
  return marks.map((mark, i) => <MarkShape key={i} mark={mark} scale={scale} palette={palette} />);
}
