import { hatching, labelPlaces, type FieldLine } from "~/sheet/field-lines";
import { levelText, useSectionLines } from "./use-field-map";

interface Props {
  px: (x: number) => number;
  py: (z: number) => number;
  /** Pixels per metre. */
  scale: number;
}

const labelApartPx = 90;
const hatchApartPx = 8;
const hatchPx = 7;

/** The contours of the slice, in the same hand as those on the drawing. */
export function SectionLines({ px, py, scale }: Props) {
  const map = useSectionLines();
  if (map === null) return null;
  const { lines, limit, grid, quantity } = map;
  const pathOf = ({ pieces }: FieldLine): string =>
    pieces
      .map((piece) => `M${piece.map(([x, z]) => `${px(x).toFixed(1)} ${py(z).toFixed(1)}`).join("L")}`)
      .join("");
  const strokes =
    limit?.pieces.flatMap((piece) => hatching(grid, piece, hatchApartPx / scale, hatchPx / scale)) ?? [];
  return (
    <g aria-hidden="true" fill="none">
      {lines.map((line) => (
        <g key={line.level}>
          <path d={pathOf(line)} className="stroke-accent" strokeOpacity="0.75" />
          {line.pieces
            .flatMap((piece) => labelPlaces(piece, labelApartPx / scale).slice(0, 1))
            .map(({ at }, i) => (
              <text
                key={i}
                x={px(at[0])}
                y={py(at[1]) + 4}
                textAnchor="middle"
                paintOrder="stroke"
                strokeWidth="4"
                className="fill-accent stroke-raised text-xs"
              >
                {levelText(line.level, quantity)}
              </text>
            ))}
        </g>
      ))}
      {limit !== null && (
        <>
          <path d={pathOf(limit)} className="stroke-over" strokeWidth="2.5" />
          <path
            d={strokes.map(([[ax, az], [bx, bz]]) => `M${px(ax)} ${py(az)}L${px(bx)} ${py(bz)}`).join("")}
            className="stroke-over"
          />
        </>
      )}
    </g>
  );
}
