import { hasHeight, isClosed, newAid, withAid, type AidKind } from "../edits/aids";
import { distanceM, flatOf, type Point2, type Point3 } from "../geometry";
import { numberText, readNumber } from "../read-number";
import { snapHere } from "./snap-here";
import {
  going,
  stepOf,
  type Mark,
  type Step,
  type StepName,
  type StepResult,
  type Surroundings,
} from "./step";

interface State {
  kind: AidKind;
  points: readonly Point3[];
  heightText: string;
  pointer: Point2 | null;
}

const stepNameOf: Record<AidKind, StepName> = {
  datum: "datum",
  mark: "mark",
  zone: "mounting-zone",
  loop: "clamp-loop",
  "section-line": "section-line",
};

/** How many points it takes; closed ones go on until they are closed. */
const wanted: Record<AidKind, number> = { datum: 1, mark: 1, zone: 3, loop: 3, "section-line": 2 };

function instructionOf({ kind, points }: State): string {
  const left = wanted[kind] - points.length;
  if (kind === "datum")
    return "Press on the point that everything on site is measured from. Escape abandons.";
  if (kind === "mark")
    return "Press on a point on site that people can find: a column, a door frame. Escape abandons.";
  if (kind === "section-line")
    return points.length === 0
      ? "Press where the section line begins: the left end of the section strip."
      : "Press where it ends. Backspace takes the point back, Escape abandons.";
  const what =
    kind === "zone" ? "the zone in which sensors may be mounted" : "the loop that the clamp meter encloses";
  if (points.length === 0) return `Press on the first corner of ${what}.`;
  return left > 0
    ? `Press on the next corner; ${left} more at least. Backspace takes one back, Escape abandons.`
    : "Press on the next corner; Enter, or a press on the first corner, closes it. Backspace takes one back.";
}

function finish({ kind, points }: State, { document }: Surroundings): StepResult {
  const aid = newAid(document, kind, [...points]);
  return {
    kind: "finished",
    label: `Draw ${aid.name}`,
    document: withAid(document, aid),
    select: [{ kind: "aid", aid: kind, id: aid.id }],
  };
}

function press(
  state: State,
  pointM: Point2,
  modifiers: Parameters<Step["press"]>[1],
  around: Surroundings,
): StepResult {
  const { kind, points } = state;
  const heightM = hasHeight(kind) ? readNumber(state.heightText) : 0;
  if (heightM === null || Math.abs(heightM) > 100_000) return going(stepIn(state, "height"));
  const { at } = snapHere(pointM, modifiers, around, points);
  const [first] = points;
  const last = points.at(-1);
  const closes = first !== undefined && distanceM(flatOf(first), at) <= around.reachM;
  if (isClosed(kind) && points.length >= wanted[kind] && closes) return finish(state, around);
  const isNew = last === undefined || distanceM(flatOf(last), at) > 1e-6 || last[2] !== heightM;
  if (!isNew) return going(stepIn(state));
  const next = { ...state, points: [...points, [...at, heightM] as Point3], pointer: null };
  return !isClosed(kind) && next.points.length === wanted[kind] ? finish(next, around) : going(stepIn(next));
}

function marksOf({ kind, points, pointer }: State): Mark[] {
  const flat = points.map(flatOf);
  const line = pointer === null ? flat : [...flat, pointer];
  const shown = isClosed(kind) && line.length > 2 ? [...line, line[0] as Point2] : line;
  return [
    ...(shown.length > 1 ? [{ kind: "line", points: shown, tone: "guide" } as const] : []),
    ...flat.map((at): Mark => ({ kind: "point", at, tone: "guide" })),
    ...(pointer === null || points.length > 0 ? [] : [{ kind: "ring", at: pointer } as const]),
  ];
}

function stepIn(state: State, focus: string | null = null): Step {
  const { kind, points, heightText } = state;
  const height = {
    id: "height",
    label: kind === "loop" ? "Height of this corner" : "Height",
    value: heightText,
    unit: "m",
    ...(readNumber(heightText) === null && {
      problem: "Type a height in metres above the finished floor, such as 2.8.",
    }),
  };
  return stepOf({
    name: stepNameOf[kind],
    instruction: instructionOf(state),
    inputs: hasHeight(kind) ? [height] : [],
    focus,
    marks: marksOf(state),
    press: (pointM, modifiers, around) => press(state, pointM, modifiers, around),
    move: (pointM, modifiers, around) =>
      going(stepIn({ ...state, pointer: snapHere(pointM, modifiers, around, points).at })),
    type: (_inputId, text) => going(stepIn({ ...state, heightText: text })),
    key: (key, _modifiers, around) => {
      if (key === "Backspace") return going(stepIn({ ...state, points: points.slice(0, -1) }));
      const complete = isClosed(kind) && points.length >= wanted[kind];
      return key === "Enter" && complete ? finish(state, around) : null;
    },
  });
}

/** Draws what people work by: a datum, a mark, a zone, a loop or a section line. */
export const beginDrawAid = (kind: AidKind, heightM: number): Step =>
  stepIn({ kind, points: [], heightText: numberText(heightM), pointer: null });

export const drawnBy = (name: StepName): AidKind | null =>
  (Object.keys(stepNameOf) as AidKind[]).find((kind) => stepNameOf[kind] === name) ?? null;
