import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import { formatBudget } from "~/domain/format";
import { NeedleMark } from "~/components/ui/NeedleMark";
import {
  figureFrame,
  type FigureFrame,
  figureLines,
  type FigureLine,
  type FigurePoint,
  scaleBarM,
} from "./figure-geometry";
import { balloonRadius, type FigureLabel, obstacleBoxes, placeBalloons, placeLabels } from "./figure-labels";
import { type Position, positionsWorstFirst } from "~/domain/positions";
import { positionKey } from "./position-key";
import { numberedSources, sourceFinder } from "~/domain/sources";

interface Props {
  document: PlanDocument;
  result: ScreeningResult;
  /** Address of the uploaded image that the document's drawing places. */
  imageUrl?: string | undefined;
  label: string;
  /** User units across: fewer make lettering larger beside the drawing. */
  width?: number | undefined;
}

const markSize = 30;
/** Half the room that a piece of equipment takes with its balloon. */
const equipmentReach = 20;

/** The plan as it was screened: conductors in copper with their numbers, sensors as needle marks. */
export function PlanFigure({ document, result, imageUrl, label, width }: Props) {
  const frame = figureFrame(document, width);
  // Lettering stays about 11 px high; on a phone the drawing scrolls sideways instead.
  const narrow = frame.width <= 720;
  const lines = figureLines(document, frame);
  const find = sourceFinder(numberedSources(document));
  const positions = positionsWorstFirst(document, result).map((position, index) => ({
    ...position,
    key: positionKey(index),
  }));
  const marks = positions.map((position) => {
    const [name, budget] = labelLines(position);
    return {
      at: frame.place(position.sensor.position),
      letters: Math.max(name.length, budget.length),
      shortLetters: position.key.length,
    };
  });
  const markBoxes = obstacleBoxes(
    marks.map(({ at }) => at),
    markSize / 2,
  );
  const equipmentBoxes = obstacleBoxes(
    document.equipment.map(({ centre }) => frame.place(centre)),
    equipmentReach,
  );
  const balloons = placeBalloons(lines, [...equipmentBoxes, ...markBoxes]);
  const obstacles = [...equipmentBoxes, ...obstacleBoxes(balloons.flat(), balloonRadius)];
  const labels = placeLabels(marks, lines, obstacles, frame, markSize / 2);
  return (
    <svg
      role="img"
      aria-label={label}
      className={`block h-auto w-full text-[13px] print:min-w-0 ${narrow ? "min-w-[38rem]" : "min-w-[62rem]"}`}
      viewBox={`0 0 ${frame.width.toFixed(0)} ${frame.height.toFixed(0)}`}
    >
      {imageUrl !== undefined && <SheetImage document={document} frame={frame} url={imageUrl} />}
      {(document.drawing.zones ?? []).map(({ id, name, outline }) => (
        <g key={id}>
          <polygon
            points={outline.map((point) => frame.place(point).join(",")).join(" ")}
            className="fill-none stroke-ink"
            strokeWidth="1.5"
          />
          {imageUrl === undefined && <ZoneName outline={outline} frame={frame} name={name} />}
        </g>
      ))}
      {lines.map((line) => (
        <Conductors key={line.circuitIds.join()} line={line} />
      ))}
      {lines.map((line, index) =>
        line.circuitIds.map((id, place) => (
          <Balloon key={id} at={balloons[index]?.[place] ?? line.middle} text={find(id).key} />
        )),
      )}
      {document.equipment.map(({ id, name, centre }) => {
        const [x, y] = frame.place(centre);
        return (
          <g key={id}>
            <title>{name}</title>
            <rect
              x={x - 9}
              y={y - 9}
              width="18"
              height="18"
              className="fill-paper stroke-copper"
              strokeWidth="2"
            />
            <path
              d={`M${x - 9} ${y - 9} L${x + 9} ${y + 9} M${x - 9} ${y + 9} L${x + 9} ${y - 9}`}
              className="stroke-copper"
            />
            <Balloon at={[x, y - 22]} text={find(id).key} />
          </g>
        );
      })}
      {positions.map((position, index) => {
        const label = labels[index];
        const mark = marks[index];
        return (
          label &&
          mark && <SensorMark key={position.sensor.id} position={position} at={mark.at} label={label} />
        );
      })}
      <ScaleBar frame={frame} />
      <NorthArrow frame={frame} northBearingDeg={document.frame.northBearingDeg} />
    </svg>
  );
}

function SheetImage({ document, frame, url }: { document: PlanDocument; frame: FigureFrame; url: string }) {
  const sheet = document.drawing.sheet;
  if (sheet === undefined) return null;
  const [x, y] = frame.place([0, 0]);
  const [originX, originY] = sheet.originPx;
  const place = `translate(${x} ${y}) rotate(${-sheet.rotationDeg}) scale(${sheet.metresPerPixel * frame.unitsPerM}) translate(${-originX} ${-originY})`;
  return (
    <image
      href={url}
      width={sheet.widthPx}
      height={sheet.heightPx}
      transform={place}
      className="sheet-image"
    />
  );
}

function ZoneName({
  outline,
  frame,
  name,
}: {
  outline: readonly (readonly number[])[];
  frame: FigureFrame;
  name: string;
}) {
  const corners = outline.map(frame.place);
  const x = Math.min(...corners.map(([cx]) => cx));
  const y = Math.max(...corners.map(([, cy]) => cy));
  return (
    <text x={x + 8} y={y - 8} className="fill-muted">
      {name}
    </text>
  );
}

/** DC: a solid line with a current arrow; AC: a double line; current not known: dashes. */
function Conductors({ line }: { line: FigureLine }) {
  const points = line.points.map((point) => point.join(",")).join(" ");
  const [x, y] = line.middle;
  const shared = { points, fill: "none", strokeLinejoin: "round" as const };
  return (
    <g>
      {line.flow === "dc" && <polyline {...shared} className="stroke-copper" strokeWidth="2" />}
      {line.flow === "unknown" && (
        <polyline {...shared} className="stroke-copper" strokeWidth="2" strokeDasharray="7 5" />
      )}
      {line.flow === "ac" && (
        <>
          <polyline {...shared} className="stroke-copper" strokeWidth="4.5" />
          <polyline {...shared} className="stroke-paper" strokeWidth="1.75" />
        </>
      )}
      {line.flow === "dc" && (
        <path
          d="M-7 -6 L9 0 L-7 6 Z"
          transform={`translate(${x} ${y}) rotate(${line.middleAngleDeg}) translate(30 0)`}
          className="fill-copper"
        />
      )}
    </g>
  );
}

function Balloon({ at: [x, y], text }: { at: readonly [number, number]; text: string }) {
  return (
    <g>
      <circle cx={x} cy={y} r="11" className="fill-paper stroke-copper" strokeWidth="1.25" />
      <text x={x} y={y + 4.5} textAnchor="middle" className="fill-ink">
        {text}
      </text>
    </g>
  );
}

type KeyedPosition = Position & { key: string };

interface SensorMarkProps {
  position: KeyedPosition;
  at: FigurePoint;
  label: FigureLabel;
}

function SensorMark({ position, at: [x, y], label }: SensorMarkProps) {
  const [textX, textY] = label.at;
  const [name, budget] = labelLines(position);
  return (
    <g>
      <title>{`${position.key} ${position.sensor.name}: ${budget}`}</title>
      <circle cx={x} cy={y} r={markSize / 2 + 1} className="fill-paper" />
      <svg x={x - markSize / 2} y={y - markSize / 2} width={markSize} height={markSize}>
        <NeedleMark
          budgetUsed={position.governing?.budgetUsed ?? 0}
          verdict={position.verdict}
          size={markSize}
          title=""
        />
      </svg>
      <g
        textAnchor={label.anchor}
        className="fill-ink stroke-paper"
        strokeWidth="4"
        strokeLinejoin="round"
        paintOrder="stroke"
      >
        <text x={textX} y={textY} fontWeight="600">
          {label.short ? position.key : name}
        </text>
        {!label.short && (
          <text x={textX} y={textY + 16}>
            {budget}
          </text>
        )}
      </g>
    </g>
  );
}

const longestName = 30;

function labelLines({ key, sensor, verdict, governing }: KeyedPosition): [name: string, budget: string] {
  const name =
    sensor.name.length > longestName ? `${sensor.name.slice(0, longestName - 1).trimEnd()}…` : sensor.name;
  return [`${key} ${name}`, `${formatBudget(governing?.budgetUsed ?? 0)}, ${verdict}`];
}

function ScaleBar({ frame }: { frame: FigureFrame }) {
  const lengthM = scaleBarM(frame);
  const y = frame.height - 18;
  const end = 16 + lengthM * frame.unitsPerM;
  return (
    <g className="stroke-ink">
      <rect x="8" y={y - 14} width={end + 56} height="24" className="fill-paper" stroke="none" />
      <path d={`M16 ${y - 5} V${y} H${end} V${y - 5}`} fill="none" />
      <text x={end + 8} y={y + 2} className="fill-ink" stroke="none">{`${lengthM} m`}</text>
    </g>
  );
}

function NorthArrow({ frame, northBearingDeg }: { frame: FigureFrame; northBearingDeg: number }) {
  return (
    <g transform={`translate(${frame.width - 28} 30)`}>
      <g transform={`rotate(${-northBearingDeg})`} className="stroke-ink">
        <path d="M0 16 V-16 M-5 -7 L0 -16 L5 -7" fill="none" />
      </g>
      <text x="-16" y="5" textAnchor="end" className="fill-ink">
        N
      </text>
    </g>
  );
}
