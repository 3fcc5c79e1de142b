import { numberText } from "~/sheet/read-number";
import { useDocument } from "../store";

/** Which way true north lies on the sheet. */
export function NorthMark() {
  const { northBearingDeg } = useDocument().frame;
  return (
    <svg
      className="pointer-events-none absolute bottom-2 right-2"
      width="44"
      height="44"
      viewBox="-22 -22 44 44"
      role="img"
      aria-label={`True north lies ${numberText((360 - northBearingDeg) % 360)}° clockwise from the top of the sheet`}
    >
      <circle r="21" className="fill-paper" fillOpacity="0.85" />
      <g transform={`rotate(${-northBearingDeg})`}>
        <line y1="15" y2="-10" className="stroke-ink" strokeWidth="1.5" />
        <path d="M0 -16 L4 -6 L-4 -6 Z" className="fill-ink" />
        <text x="6" y="-8" className="fill-ink text-xs">
          N
        </text>
      </g>
    </svg>
  );
}
