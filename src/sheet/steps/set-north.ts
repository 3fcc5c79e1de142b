import { bearingDeg, distanceM, type Point2 } from "../geometry";
import { numberText, readNumber } from "../read-number";
import { snapToThings } from "./snap-here";
import { going, stepOf, type Step, type StepResult, type Surroundings } from "./step";

interface State {
  from: Point2 | null;
  pointer: Point2 | null;
  bearingText: string;
  problem: string | null;
}

/** The bearing of +y when true north lies from `from` to `to`. */
const northBearingOf = (from: Point2, to: Point2): number => {
  const turnedDeg = (360 - bearingDeg(from, to, 0)) % 360;
  return Number(turnedDeg.toFixed(2)) % 360;
};

const withNorth = ({ document }: Surroundings, northBearingDeg: number): StepResult => ({
  kind: "finished",
  label: "Set north",
  document: { ...document, frame: { ...document.frame, northBearingDeg } },
});

function stepIn(state: State): Step {
  const { from, pointer, bearingText, problem } = state;
  return stepOf({
    name: "set-north",
    instruction:
      from === null
        ? "Press on a point, then on a second one that lies true north of it. Or type the true bearing that points up the sheet and press Enter."
        : "Press on a point that lies true north of the first.",
    inputs: [
      {
        id: "bearing",
        label: "Bearing up the sheet",
        value: bearingText,
        unit: "°",
        ...(problem !== null && { problem }),
      },
    ],
    marks: [
      ...(from !== null && pointer !== null
        ? [{ kind: "line", points: [from, pointer], tone: "measure" } as const]
        : []),
      ...(from !== null ? [{ kind: "point", at: from, tone: "measure" } as const] : []),
    ],
    press: (pointM, modifiers, around) => {
      const at = snapToThings(pointM, modifiers, around);
      if (from === null) return going(stepIn({ ...state, from: at, problem: null }));
      return distanceM(from, at) === 0 ? going(stepIn(state)) : withNorth(around, northBearingOf(from, at));
    },
    move: (pointM, modifiers, around) =>
      going(stepIn({ ...state, pointer: snapToThings(pointM, modifiers, around) })),
    type: (_input, text) => going(stepIn({ ...state, bearingText: text, problem: null })),
    key: (key, _modifiers, around) => {
      if (key === "Backspace") return going(stepIn({ ...state, from: null }));
      if (key !== "Enter") return null;
      const typedDeg = readNumber(bearingText);
      if (typedDeg === null || Math.abs(typedDeg) > 360) {
        return going(
          stepIn({ ...state, problem: "Type a bearing from 0 to 360 degrees, clockwise from true north." }),
        );
      }
      return withNorth(around, ((typedDeg % 360) + 360) % 360);
    },
  });
}

/** A line towards true north, or a typed bearing, turns the plan's frame. */
export const beginSetNorth = ({ document }: Surroundings): Step =>
  stepIn({
    from: null,
    pointer: null,
    bearingText: numberText(document.frame.northBearingDeg),
    problem: null,
  });
