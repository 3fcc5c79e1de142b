import { budgetBarGeometry, type BudgetBarGeometry, type BudgetBarInput } from "./budget-bar-geometry";
import { formatBudget, formatShare } from "~/domain/format";

interface Props extends BudgetBarInput {
  /** Whose budget, for the spoken text. */
  sensorName: string;
  /** Leaves the scale's figures out. */
  compact?: boolean | undefined;
  /** The source whose part is lit, here or on the drawing. */
  litId?: string | null | undefined;
  /** Told the source under the pointer, null when it leaves. */
  onHover?: ((sourceId: string | null) => void) | undefined;
}

const barTop = 6;
const barHeight = 22;
const percent = (share: number) => `${share.toFixed(3)}%`;

// Neighbours differ in shade; the number in the balloon says which source it is.
const shades = [0.82, 0.46, 0.64, 0.3];

/** Who spends a sensor's budget: a stacked bar with ticks at 100 % and the guard band around it; relief lies left of zero. */
export function BudgetBar({ sensorName, compact = false, litId = null, onHover, ...input }: Props) {
  const bar = budgetBarGeometry(input);
  const height = compact ? barTop + barHeight + 6 : barTop + barHeight + 22;
  return (
    <svg
      className="budget-bar"
      role="img"
      aria-label={spoken(sensorName, input)}
      width="100%"
      height={height}
    >
      <rect
        x={percent(bar.zero)}
        y={barTop}
        width={percent(bar.full - bar.zero)}
        height={barHeight}
        className="fill-raised stroke-rule"
      />
      {bar.segments.map((segment, index) => (
        <Segment
          key={segment.id}
          segment={segment}
          shade={shades[index % shades.length] ?? 0.5}
          lit={segment.id === litId}
          onHover={onHover}
        />
      ))}
      <GuardBand guard={bar.guard} />
      <Upright at={bar.zero} from={barTop - 2} to={barTop + barHeight + 4} className="stroke-ink" width={1} />
      <Upright at={bar.full} from={0} to={barTop + barHeight + 6} className="stroke-ink" width={2} />
      <ValueMark at={bar.value} />
      {!compact && <ScaleFigures bar={bar} />}
    </svg>
  );
}

function spoken(sensorName: string, { budgetUsed, parts }: BudgetBarInput): string {
  const spenders = parts.map(({ name, part }) => `${name} ${formatShare(part)}`).join(", ");
  return `Budget of ${sensorName}: ${formatBudget(budgetUsed)} used${spenders === "" ? "" : `, of it ${spenders}`}`;
}

interface SegmentProps {
  segment: BudgetBarGeometry["segments"][number];
  shade: number;
  lit: boolean;
  onHover: Props["onHover"];
}

function Segment({ segment, shade, lit, onHover }: SegmentProps) {
  const middle = segment.from + segment.width / 2;
  const outline = segment.relieves ? "fill-none stroke-copper" : "fill-copper stroke-paper";
  const hover = onHover && { onPointerEnter: () => onHover(segment.id), onPointerLeave: () => onHover(null) };
  return (
    <g {...hover} pointerEvents="all">
      <title>{`${segment.key} ${segment.name}: ${formatShare(segment.part)}${segment.relieves ? " (relieves)" : ""}`}</title>
      <rect
        x={percent(segment.from)}
        y={barTop}
        width={percent(segment.width)}
        height={barHeight}
        className={lit ? "fill-accent stroke-accent" : outline}
        fillOpacity={lit ? 1 : shade}
        strokeDasharray={segment.relieves ? "3 2" : undefined}
      />
      {segment.width >= 8 && (
        <>
          <circle cx={percent(middle)} cy={barTop + barHeight / 2} r="9" className="fill-paper" />
          <text x={percent(middle)} y={barTop + barHeight / 2 + 4.5} textAnchor="middle">
            {segment.key}
          </text>
        </>
      )}
    </g>
  );
}

function GuardBand({ guard }: { guard: BudgetBarGeometry["guard"] }) {
  if (guard.width < 0.1) return null;
  const top = 2;
  const bottom = barTop + barHeight + 4;
  return (
    <g pointerEvents="none">
      <rect
        x={percent(guard.from)}
        y={top}
        width={percent(guard.width)}
        height={bottom - top}
        className="fill-undecided"
        fillOpacity="0.2"
      />
      {[guard.from, guard.from + guard.width].map((at) => (
        <line
          key={at}
          x1={percent(at)}
          x2={percent(at)}
          y1={top}
          y2={bottom}
          className="stroke-undecided"
          strokeDasharray="2 2"
        />
      ))}
    </g>
  );
}

interface UprightProps {
  at: number;
  from: number;
  to: number;
  className: string;
  width: number;
}

function Upright({ at, from, to, className, width }: UprightProps) {
  return (
    <line x1={percent(at)} x2={percent(at)} y1={from} y2={to} className={className} strokeWidth={width} />
  );
}

/** Where the value stands: a pointer from above and a line through the bar. */
function ValueMark({ at }: { at: number }) {
  return (
    <svg x={percent(at)} y="0" width="1" height={barTop + barHeight} overflow="visible">
      <path d={`M0 ${barTop + 1} L-4.5 -2 L4.5 -2 Z`} className="fill-ink" />
      <line x1="0" x2="0" y1="0" y2={barTop + barHeight} className="stroke-ink" strokeWidth="1" />
    </svg>
  );
}

function ScaleFigures({ bar }: { bar: BudgetBarGeometry }) {
  const y = barTop + barHeight + 19;
  const roomAtZero = bar.full - bar.zero > 14;
  const anchor = bar.full > 93 ? "end" : bar.full < 6 ? "start" : "middle";
  const clearOfFull = bar.ticks.filter(({ at }) => Math.abs(at - bar.full) > 14);
  return (
    <>
      {roomAtZero && (
        <text
          x={percent(bar.zero)}
          y={y}
          className="budget-bar-scale"
          textAnchor={bar.zero < 3 ? "start" : "middle"}
        >
          0
        </text>
      )}
      <text x={percent(bar.full)} y={y} textAnchor={anchor}>
        {"100\u00a0%"}
      </text>
      {bar.ticks.map(({ at, budget }) => (
        <Upright
          key={budget}
          at={at}
          from={barTop + barHeight}
          to={barTop + barHeight + 4}
          className="stroke-rule-strong"
          width={1}
        />
      ))}
      {clearOfFull.map(({ at, budget }) => (
        <text
          key={budget}
          x={percent(at)}
          y={y}
          className="budget-bar-scale"
          textAnchor={at > 93 ? "end" : "middle"}
        >
          {`${budget * 100}\u00a0%`}
        </text>
      ))}
    </>
  );
}
