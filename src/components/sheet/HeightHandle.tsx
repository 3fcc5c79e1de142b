import { useRef, type ReactNode } from "react";
import type { Point2 } from "~/sheet/geometry";
import { numberText } from "~/sheet/read-number";

interface Props {
  label: string;
  editable: boolean;
  heightM: number;
  /** Where it stands on the strip. */
  x: number;
  y: number;
  metresPerPixel: number;
  /** What an arrow key changes the height by, and what a drag rounds to. */
  stepM: number;
  /** By how much the drag has lifted it so far; null when it ends. */
  onDrag: (byM: number | null) => void;
  onLift: (byM: number) => void;
  onFocus?: () => void;
  children: ReactNode;
}

/** Something on the strip whose height is dragged, or changed by arrow keys: a slider to whoever can't see it. */
export function HeightHandle(props: Props) {
  const { label, editable, heightM, x, y, metresPerPixel, stepM, onDrag, onLift, onFocus, children } = props;
  const fromY = useRef<number | null>(null);
  const liftOf = (clientY: number): number => {
    const byM = ((fromY.current ?? clientY) - clientY) * metresPerPixel;
    return Number((Math.round((heightM + byM) / stepM) * stepM - heightM).toFixed(4));
  };
  const keys: Readonly<Record<string, number>> = {
    ArrowUp: 1,
    ArrowRight: 1,
    ArrowDown: -1,
    ArrowLeft: -1,
    PageUp: 10,
    PageDown: -10,
  };
  return (
    <g
      transform={`translate(${x} ${y})`}
      role="slider"
      tabIndex={0}
      aria-label={label}
      aria-orientation="vertical"
      aria-valuenow={Number(heightM.toFixed(3))}
      aria-valuetext={`${numberText(heightM)} m`}
      aria-readonly={!editable}
      className={editable ? "cursor-ns-resize touch-none" : ""}
      onFocus={onFocus}
      onKeyDown={(event) => {
        const steps = keys[event.key];
        if (!editable || steps === undefined) return;
        event.preventDefault();
        onLift(Number((steps * stepM).toFixed(4)));
      }}
      onPointerDown={(event) => {
        if (!editable || event.button !== 0) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        fromY.current = event.clientY;
      }}
      onPointerMove={(event) => {
        if (fromY.current !== null) onDrag(liftOf(event.clientY));
      }}
      onPointerUp={(event) => {
        if (fromY.current === null) return;
        const byM = liftOf(event.clientY);
        fromY.current = null;
        onDrag(null);
        if (byM !== 0) onLift(byM);
      }}
      onPointerCancel={() => {
        fromY.current = null;
        onDrag(null);
      }}
    >
      <circle r="12" fill="transparent" />
      {children}
    </g>
  );
}

/** The name and the height beside a handle, where there is room for them. */
export function HandleLabel({ at, text }: { at: Point2 | undefined; text: string }) {
  if (at === undefined) return null;
  return (
    <text x={at[0]} y={at[1] + 12} className="fill-ink text-xs">
      {text}
    </text>
  );
}
