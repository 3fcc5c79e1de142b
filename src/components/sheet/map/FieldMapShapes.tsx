import { memo } from "react";
import { Group, Line, Shape, Text } from "react-konva";
import { hatching, labelPlaces, type FieldLine } from "~/sheet/field-lines";
import type { Palette } from "../canvas/use-palette";
import { useMapLines, levelText, type MapLines } from "./use-field-map";

/** Labels stand this far apart, strokes of the hatching this far. */
const labelApartPx = 120;
const hatchApartPx = 9;
const hatchPx = 8;

/** Labelled contour lines in one hue, and the limit as a heavy line hatched on the side to keep out of. */
export function FieldMapShapes({ scale, palette }: { scale: number; palette: Palette }) {
  const map = useMapLines();
  return map === null ? null : <Lines map={map} scale={scale} palette={palette} />;
}

const Lines = memo(function Lines({
  map,
  scale,
  palette,
}: {
  map: MapLines;
  scale: number;
  palette: Palette;
}) {
  const { lines, limit, quantity, grid } = map;
  return (
    <>
      {lines.map((line) => (
        <LevelLine
          key={line.level}
          line={line}
          text={levelText(line.level, quantity)}
          scale={scale}
          palette={palette}
        />
      ))}
      {limit !== null && (
        <>
          {limit.pieces.map((piece, i) => (
            <Line
              key={i}
              points={piece.flatMap(([x, y]) => [x, y])}
              stroke={palette.over}
              strokeWidth={3}
              strokeScaleEnabled={false}
              listening={false}
            />
          ))}
          <Shape
            listening={false}
            stroke={palette.over}
            strokeWidth={1.25}
            strokeScaleEnabled={false}
            sceneFunc={(context, shape) => {
              context.beginPath();
              for (const piece of limit.pieces) {
                for (const [from, to] of hatching(grid, piece, hatchApartPx / scale, hatchPx / scale)) {
                  context.moveTo(from[0], from[1]);
                  context.lineTo(to[0], to[1]);
                }
              }
              context.strokeShape(shape);
            }}
          />
          <Labels
            line={limit}
            text={`limit ${levelText(limit.level, quantity)}`}
            scale={scale}
            colour={palette.over}
            palette={palette}
          />
        </>
      )}
    </>
  );
});

interface LevelProps {
  line: FieldLine;
  text: string;
  scale: number;
  palette: Palette;
}

function LevelLine({ line, text, scale, palette }: LevelProps) {
  return (
    <>
      {line.pieces.map((piece, i) => (
        <Line
          key={i}
          points={piece.flatMap(([x, y]) => [x, y])}
          stroke={palette.accent}
          opacity={0.75}
          strokeWidth={1.25}
          strokeScaleEnabled={false}
          listening={false}
        />
      ))}
      <Labels line={line} text={text} scale={scale} colour={palette.accent} palette={palette} />
    </>
  );
}

function Labels({ line, text, scale, colour, palette }: LevelProps & { colour: string }) {
  const places = line.pieces.flatMap((piece) => labelPlaces(piece, labelApartPx / scale));
  return places.map(({ at, angleRad }, i) => {
    // Upside down text is turned round.
    const upright = Math.cos(angleRad) < 0 ? angleRad + Math.PI : angleRad;
    return (
      <Group
        key={i}
        x={at[0]}
        y={at[1]}
        scaleX={1 / scale}
        scaleY={-1 / scale}
        rotation={(upright * 180) / Math.PI}
      >
        <Text
          text={text}
          offsetX={text.length * 3.2}
          offsetY={6}
          fontSize={12}
          fontFamily="Source Sans 3"
          fill={colour}
          stroke={palette.paper}
          strokeWidth={4}
          fillAfterStrokeEnabled
          listening={false}
        />
      </Group>
    );
  });
}
