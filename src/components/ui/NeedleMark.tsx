import type { Verdict } from "~/domain/screening-result";
import { formatBudget } from "~/domain/format";
import { needleAngleDeg } from "./needle-geometry";

interface Props {
  /** Value over limit; 1 is a full budget. */
  budgetUsed: number;
  /** Null where nothing has been screened yet. */
  verdict: Verdict | null;
  /** Edge in px. */
  size?: number | undefined;
  /** Replaces the spoken text; empty where the words stand beside the mark. */
  title?: string | undefined;
  className?: string | undefined;
}

/** The mark of a sensor: a needle in a ring that tilts with the budget used, filled when over, half filled when undecided. */
export function NeedleMark({ budgetUsed, verdict, size = 28, title, className = "" }: Props) {
  const text =
    title ??
    (verdict === null ? "not screened yet" : `${formatBudget(budgetUsed)} of the budget used, ${verdict}`);
  const name = text === "" ? { "aria-hidden": true as const } : { role: "img", "aria-label": text };
  return (
    <svg
      {...name}
      className={`needle-mark ${verdict === null ? "text-muted" : `verdict-${verdict}`} ${className}`}
      width={size}
      height={size}
      viewBox="0 0 32 32"
    >
      {text !== "" && <title>{text}</title>}
      <circle
        cx="16"
        cy="16"
        r="14"
        fill={verdict === "over" ? "currentColor" : "none"}
        stroke="currentColor"
        strokeWidth="1.75"
        strokeDasharray={verdict === null ? "3 3" : undefined}
      />
      {verdict === "undecided" && (
        <path d="M16 2 A14 14 0 0 0 16 30 Z" fill="currentColor" fillOpacity="0.38" />
      )}
      <Needle angleDeg={verdict === null ? 0 : needleAngleDeg(budgetUsed)} inverse={verdict === "over"} />
    </svg>
  );
}

function Needle({ angleDeg, inverse }: { angleDeg: number; inverse: boolean }) {
  const tone = inverse ? "fill-paper stroke-paper" : "fill-ink stroke-ink";
  return (
    <g className={tone} transform={`rotate(${angleDeg.toFixed(1)} 16 16)`} strokeWidth="1">
      <path d="M16 4.5 L18.6 16 L13.4 16 Z" stroke="none" />
      <path d="M16 27.5 L18.6 16 L13.4 16 Z" fill="none" strokeLinejoin="round" />
    </g>
  );
}
