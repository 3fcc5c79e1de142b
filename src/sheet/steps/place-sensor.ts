import type { SensorKind } from "~/domain/catalogue";
import { limitsOfKind } from "../edits/sensor-kinds";
import { freeName } from "../edits/ids";
import { addSensor, needsEarthField } from "../edits/sensors";
import type { Point2 } from "../geometry";
import { numberText, readNumber } from "../read-number";
import type { Modifiers } from "../snapping";
import { snapHere } from "./snap-here";
import { going, stepOf, type Step, type StepResult, type Surroundings } from "./step";

interface State {
  kinds: readonly SensorKind[];
  kindId: string;
  heightText: string;
  pointer: Point2 | null;
  problem: string | null;
}

const kindOf = ({ kinds, kindId }: State): SensorKind | undefined => kinds.find(({ id }) => id === kindId);

function place(state: State, pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult {
  const kind = kindOf(state);
  const heightM = readNumber(state.heightText);
  if (kind === undefined || heightM === null || Math.abs(heightM) > 100_000) return going(stepIn(state));
  const limits = limitsOfKind(kind);
  const lacksEarth = limits.some(needsEarthField) && around.document.earthField === null;
  if (lacksEarth && around.siteEarth === null) {
    const problem =
      "This kind is judged against the Earth's field: state it under Plan first, or give the site its place.";
    return going(stepIn({ ...state, problem }));
  }
  const document = lacksEarth ? { ...around.document, earthField: around.siteEarth } : around.document;
  const { at } = snapHere(pointM, modifiers, { ...around, snap: { ...around.snap, vertices: false } });
  const name = freeName(kind.name, document.sensors);
  const placed = addSensor(document, name, [...at, heightM], limits);
  return {
    kind: "finished",
    label: `Place ${name}`,
    document: placed.document,
    select: [{ kind: "sensor", id: placed.sensorId }],
  };
}

function stepIn(state: State): Step {
  const kind = kindOf(state);
  const heightM = readNumber(state.heightText);
  return stepOf({
    name: "place-sensor",
    instruction: `Press where the ${kind?.name.toLowerCase() ?? "sensor"} goes, at the height given here. Escape abandons.`,
    inputs: [
      {
        id: "kind",
        label: "Kind",
        value: state.kindId,
        choices: state.kinds.map(({ id, name }) => ({ value: id, label: name })),
        ...(state.problem !== null && { problem: state.problem }),
      },
      {
        id: "height",
        label: "Height",
        value: state.heightText,
        unit: "m",
        ...(heightM === null && {
          problem: "Type a height in metres above the finished floor, such as 1.1.",
        }),
      },
    ],
    marks: state.pointer === null ? [] : [{ kind: "ring", at: state.pointer }],
    press: (pointM, modifiers, around) => place(state, pointM, modifiers, around),
    move: (pointM, modifiers, around) => {
      const { at } = snapHere(pointM, modifiers, { ...around, snap: { ...around.snap, vertices: false } });
      return going(stepIn({ ...state, pointer: at }));
    },
    type: (inputId, text) =>
      going(
        stepIn(
          inputId === "kind" ? { ...state, kindId: text, problem: null } : { ...state, heightText: text },
        ),
      ),
  });
}

/** One press puts a sensor of the chosen kind on the plan, with that kind's limits. */
export const beginPlaceSensor = (kinds: readonly SensorKind[], kindId: string, heightM: number): Step =>
  stepIn({ kinds, kindId, heightText: numberText(heightM), pointer: null, problem: null });
