import { bearingDeg, distanceM, type Point2 } from "../geometry";
import { abandoned, going, stepOf, type Mark, type Step } from "./step";
import { snapToThings } from "./snap-here";

interface State {
  points: readonly Point2[];
  pointer: Point2 | null;
  northBearingDeg: number;
}

const metres = (lengthM: number): string => `${lengthM.toFixed(lengthM < 10 ? 3 : 2)} m`;

function totalM(points: readonly Point2[]): number {
  return points.reduce(
    (sumM, point, i) => (i === 0 ? 0 : sumM + distanceM(points[i - 1] as Point2, point)),
    0,
  );
}

function lastLegWords(points: readonly Point2[], northBearingDeg: number): string {
  const [from, to] = points.slice(-2);
  if (from === undefined || to === undefined) return "";
  const bearing = bearingDeg(from, to, northBearingDeg);
  const apart = `x ${metres(Math.abs(to[0] - from[0]))}, y ${metres(Math.abs(to[1] - from[1]))}`;
  return `${metres(distanceM(from, to))} (${apart}), bearing ${bearing.toFixed(1)}°`;
}

function marksOf(line: readonly Point2[], northBearingDeg: number): Mark[] {
  const last = line.at(-1);
  return [
    ...(line.length > 1 ? [{ kind: "line", points: line, tone: "measure" } as const] : []),
    ...line.map((at): Mark => ({ kind: "point", at, tone: "measure" })),
    ...(line.length > 1 && last !== undefined
      ? [{ kind: "label", at: last, text: lastLegWords(line, northBearingDeg) } as const]
      : []),
  ];
}

function stepIn(state: State): Step {
  const { points, pointer, northBearingDeg } = state;
  const line = points.length > 0 && pointer !== null ? [...points, pointer] : points;
  const measured =
    line.length < 2 ? "" : ` ${lastLegWords(line, northBearingDeg)}. ${metres(totalM(line))} in all.`;
  return stepOf({
    name: "measure",
    instruction:
      points.length === 0
        ? "Press on the point to measure from."
        : `Press on the next point; Backspace takes one back, Enter or Escape ends.${measured}`,
    marks: marksOf(line, northBearingDeg),
    press: (pointM, modifiers, around) =>
      going(
        stepIn({ ...state, points: [...points, snapToThings(pointM, modifiers, around)], pointer: null }),
      ),
    move: (pointM, modifiers, around) =>
      going(stepIn({ ...state, pointer: snapToThings(pointM, modifiers, around) })),
    key: (key) => {
      if (key === "Enter") return abandoned;
      if (key === "Backspace") return going(stepIn({ ...state, points: points.slice(0, -1) }));
      return null;
    },
  });
}

/** Lengths and bearings between points; changes nothing, so its way out is to end. */
export const beginMeasure = (northBearingDeg: number): Step =>
  stepIn({ points: [], pointer: null, northBearingDeg });
