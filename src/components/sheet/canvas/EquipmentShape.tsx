import { memo } from "react";
import { Circle, Group, Line, Path, Text } from "react-konva";
import type { Equipment } from "~/domain/plan-document/equipment";
import { outlineOf, shownAxis } from "~/sheet/equipment-outline";
import type { Point2 } from "~/sheet/geometry";
import { arrowPath, intoPath, markPaths, markPx, outPath } from "../equipment/mark-paths";
import type { Palette } from "./use-palette";

interface Props {
  item: Equipment;
  scale: number;
  palette: Palette;
  selected: boolean;
  lit: boolean;
  /** Upper left corner of the name beside the mark, px; null where there is no room for it. */
  labelAt: Point2 | null;
  label: string;
}

/** A coil, toroid or dipole: its outline to scale, a mark that says what it is, and its axis. */
export const EquipmentShape = memo(function EquipmentShape(props: Props) {
  const { item, scale, palette, selected, lit, labelAt, label } = props;
  const colour = lit || selected ? palette.accent : palette.copper;
  const outline = outlineOf(item, "from above");
  const axis = shownAxis(item, "from above");
  const { body, inside } = markPaths[item.kind];
  const line = { stroke: colour, strokeWidth: lit ? 2.5 : 1.75, lineJoin: "round" } as const;
  return (
    <>
      {outline !== null && (
        <Line
          points={outline.flatMap(([x, y]) => [x, y])}
          closed
          stroke={colour}
          strokeWidth={1}
          dash={[3, 3]}
          strokeScaleEnabled={false}
        />
      )}
      <Group x={item.centre[0]} y={item.centre[1]} scaleX={1 / scale} scaleY={-1 / scale}>
        {(selected || lit) && (
          <Circle
            radius={markPx + 5}
            stroke={palette.accent}
            strokeWidth={selected ? 3 : 1.5}
            opacity={0.9}
          />
        )}
        <Path data={body} fill={palette.paper} {...line} />
        <Path data={inside} {...line} strokeWidth={1.5} />
        {axis !== null && axis.part > 0.1 && (
          <Group rotation={(-Math.atan2(axis.direction[1], axis.direction[0]) * 180) / Math.PI}>
            <Path data={arrowPath(6 + 16 * axis.part)} {...line} />
          </Group>
        )}
        {axis !== null && axis.part < 0.995 && (
          <Path data={axis.towards ? outPath : intoPath} {...line} strokeWidth={1.5} fill={palette.paper} />
        )}
        {labelAt !== null && (
          <Text
            x={labelAt[0]}
            y={labelAt[1]}
            text={label}
            fontSize={14}
            fontFamily="Source Sans 3"
            fill={palette.ink}
            stroke={palette.paper}
            strokeWidth={3.5}
            fillAfterStrokeEnabled
          />
        )}
      </Group>
    </>
  );
});
