import { useSheet } from "../store";
import { gridStepM } from "~/sheet/view";
import { numberText } from "~/sheet/read-number";

/** A length on the plan at the present zoom. */
export function ScaleBar() {
  const scale = useSheet(({ view }) => view.scale);
  const lengthM = gridStepM(scale, 64);
  const widthPx = lengthM * scale;
  return (
    <svg
      width={widthPx + 50}
      height="20"
      role="img"
      aria-label={`Scale bar: ${numberText(lengthM)} m`}
      className="bg-paper/85"
    >
      <path d={`M4 6 V12 H${4 + widthPx} V6`} fill="none" className="stroke-ink" strokeWidth="1.5" />
      <text x={10 + widthPx} y="14" className="fill-ink text-xs">
        {numberText(lengthM)} m
      </text>
    </svg>
  );
}
