import { memo } from "react";
import { Circle, Group, Line } from "react-konva";
import type { OwnedPath } from "~/sheet/edits/paths";
import { distanceM, flatOf, type Point2, type Point3 } from "~/sheet/geometry";
import type { Palette } from "./use-palette";

/** What a path carries: DC reads as a solid line with an arrow, AC as a double line, nothing known yet as dashes. */
export interface Carried {
  dc: boolean;
  ac: boolean;
  /** True where the current runs against the path. */
  reversed: boolean;
}

interface Props {
  owned: OwnedPath;
  carried: Carried;
  scale: number;
  palette: Palette;
  selected: boolean;
  lit: boolean;
}

/** The middle of the longest leg, where an arrow has room. */
function arrowPlace(path: readonly Point3[]): { at: Point2; angleDeg: number; lengthM: number } | null {
  let longest: { at: Point2; angleDeg: number; lengthM: number } | null = null;
  for (let i = 1; i < path.length; i++) {
    const [a, b] = [flatOf(path[i - 1] as Point3), flatOf(path[i] as Point3)];
    const lengthM = distanceM(a, b);
    if (lengthM === 0 || (longest !== null && lengthM <= longest.lengthM)) continue;
    longest = {
      at: [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2],
      angleDeg: (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI,
      lengthM,
    };
  }
  return longest;
}

/** Places where the path rises or drops with no way in plan: they show as a ring. */
function risersOf(path: readonly Point3[]): Point2[] {
  return path.flatMap((vertex, i) => {
    const before = path[i - 1];
    return before !== undefined && distanceM(flatOf(before), flatOf(vertex)) < 1e-6 && before[2] !== vertex[2]
      ? [flatOf(vertex)]
      : [];
  });
}

export const PathShape = memo(function PathShape({ owned, carried, scale, palette, selected, lit }: Props) {
  const { path } = owned;
  const colour = lit || selected ? palette.accent : palette.copper;
  const points = path.flatMap(([x, y]) => [x, y]);
  const arrow = carried.dc ? arrowPlace(path) : null;
  const known = carried.dc || carried.ac;
  const width = lit ? 4 : 2.5;
  const common = {
    points,
    listening: false,
    strokeScaleEnabled: false,
    lineCap: "round",
    lineJoin: "round",
  } as const;
  return (
    <>
      {selected && <Line {...common} stroke={palette.accent} strokeWidth={12} opacity={0.22} />}
      <Line
        {...common}
        stroke={colour}
        strokeWidth={carried.ac ? width + 4 : width}
        {...(!known && { dash: [9, 6] })}
      />
      {carried.ac && <Line {...common} stroke={palette.paper} strokeWidth={width} />}
      {arrow !== null && arrow.lengthM * scale > 24 && (
        <Group
          x={arrow.at[0]}
          y={arrow.at[1]}
          scaleX={1 / scale}
          scaleY={1 / scale}
          rotation={arrow.angleDeg + (carried.reversed ? 180 : 0)}
        >
          <Line points={[7, 0, -6, 6, -6, -6]} closed fill={colour} listening={false} />
        </Group>
      )}
      {risersOf(path).map(([x, y], i) => (
        <Circle
          key={i}
          x={x}
          y={y}
          radius={6 / scale}
          stroke={colour}
          strokeWidth={2}
          strokeScaleEnabled={false}
          fill={palette.paper}
          listening={false}
        />
      ))}
    </>
  );
});
