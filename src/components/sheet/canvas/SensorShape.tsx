import { memo } from "react";
import { Arc, Circle, Group, Line, Text } from "react-konva";
import type { Sensor } from "~/domain/plan-document/sensor";
import type { Verdict } from "~/domain/screening-result";
import { needleAngleDeg } from "~/components/ui/needle-geometry";
import type { Point2 } from "~/sheet/geometry";
import type { Palette } from "./use-palette";

interface Props {
  sensor: Sensor;
  /** Null while there is no result for it. */
  verdict: Verdict | null;
  budgetUsed: number;
  scale: number;
  palette: Palette;
  selected: boolean;
  /** Upper left corner of the name beside the mark, px; null where there is no room for it. */
  labelAt: Point2 | null;
}

export const radiusPx = 12;

/** The mark of a sensor: a needle in a ring, tilting with the budget used. */
export const SensorShape = memo(function SensorShape(props: Props) {
  const { sensor, verdict, budgetUsed, scale, palette, selected, labelAt } = props;
  const colour = verdict === null ? palette.muted : palette[verdict];
  const over = verdict === "over";
  const needle = over ? palette.paper : palette.ink;
  return (
    <Group
      x={sensor.position[0]}
      y={sensor.position[1]}
      scaleX={1 / scale}
      scaleY={-1 / scale}
      listening={false}
    >
      {selected && <Circle radius={radiusPx + 6} stroke={palette.accent} strokeWidth={3} opacity={0.9} />}
      <Circle
        radius={radiusPx}
        fill={over ? colour : palette.paper}
        stroke={colour}
        strokeWidth={2}
        {...(verdict === null && { dash: [4, 3] })}
      />
      {verdict === "undecided" && (
        <Arc innerRadius={0} outerRadius={radiusPx} angle={180} rotation={90} fill={colour} opacity={0.4} />
      )}
      <Group rotation={verdict === null ? 0 : needleAngleDeg(budgetUsed)}>
        <Line points={[0, -9, 2.4, 0, -2.4, 0]} closed fill={needle} />
        <Line points={[0, 9, 2.4, 0, -2.4, 0]} closed stroke={needle} strokeWidth={1} />
      </Group>
      {labelAt !== null && (
        <Text
          x={labelAt[0]}
          y={labelAt[1]}
          text={sensor.name}
          fontSize={14}
          fontFamily="Source Sans 3"
          fill={palette.ink}
          stroke={palette.paper}
          strokeWidth={3.5}
          fillAfterStrokeEnabled
        />
      )}
    </Group>
  );
});
