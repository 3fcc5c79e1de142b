import { setScale } from "../edits/scale";
import { distanceM, type Point2 } from "../geometry";
import { readNumber } from "../read-number";
import { snapToThings } from "./snap-here";
import { going, stepOf, type Mark, type Step, type StepResult, type Surroundings } from "./step";

interface State {
  points: readonly Point2[];
  pointer: Point2 | null;
  lengthText: string;
  problem: string | null;
}

const instructionOf = ({ points }: State): string => {
  if (points.length === 0)
    return "Press on one end of a length that you know, such as a wall or a printed dimension.";
  if (points.length === 1) return "Press on the other end of it.";
  return "Type the length between the two points in metres and press Enter.";
};

function marksOf({ points, pointer }: State): Mark[] {
  const line = points.length === 1 && pointer !== null ? [...points, pointer] : points;
  return [
    ...(line.length === 2 ? [{ kind: "line", points: line, tone: "measure" } as const] : []),
    ...points.map((at): Mark => ({ kind: "point", at, tone: "measure" })),
  ];
}

function finish(state: State, { document }: Surroundings): StepResult {
  const [a, b] = state.points;
  if (a === undefined || b === undefined) return going(stepIn(state));
  const knownLengthM = readNumber(state.lengthText);
  if (knownLengthM === null || knownLengthM <= 0 || knownLengthM > 100_000) {
    return going(stepIn({ ...state, problem: "Type a length above 0 in metres, such as 12.4." }));
  }
  return { kind: "finished", label: "Set scale", document: setScale(document, a, b, knownLengthM) };
}

function stepIn(state: State): Step {
  const { points, lengthText, problem } = state;
  return stepOf({
    name: "set-scale",
    instruction: instructionOf(state),
    inputs:
      points.length < 2
        ? []
        : [
            {
              id: "length",
              label: "Known length",
              value: lengthText,
              unit: "m",
              ...(problem !== null && { problem }),
            },
          ],
    focus: points.length === 2 ? "length" : null,
    marks: marksOf(state),
    press: (pointM, modifiers, around) => {
      const at = snapToThings(pointM, modifiers, around);
      const [first] = points;
      if (points.length === 1 && first !== undefined && distanceM(first, at) === 0)
        return going(stepIn(state));
      return going(stepIn({ ...state, points: points.length === 2 ? [at] : [...points, at], problem: null }));
    },
    move: (pointM, modifiers, around) =>
      going(stepIn({ ...state, pointer: snapToThings(pointM, modifiers, around) })),
    type: (_input, text) => going(stepIn({ ...state, lengthText: text, problem: null })),
    key: (key, _modifiers, around) => {
      if (key === "Enter") return finish(state, around);
      if (key === "Backspace") return going(stepIn({ ...state, points: points.slice(0, -1), problem: null }));
      return null;
    },
  });
}

/** Two points and the length between them give the drawing its scale. */
export const beginSetScale = (): Step => stepIn({ points: [], pointer: null, lengthText: "", problem: null });
