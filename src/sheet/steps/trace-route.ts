import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Supply } from "~/domain/plan-document/supply";
import { supplyOf, traceCircuit } from "../edits/circuits";
import { distanceM, flatOf, pathLengthM, type Point2, type Point3 } from "../geometry";
import { numberText, readNumber } from "../read-number";
import type { Modifiers } from "../snapping";
import { snapHere } from "./snap-here";
import {
  going,
  stepOf,
  type Mark,
  type Step,
  type StepInput,
  type StepResult,
  type Surroundings,
} from "./step";

/** The waiting circuit that is traced; null where the route makes a new one. */
export interface TraceFor {
  id: string;
  name: string;
}

type Change = "riser" | "slope";

interface State {
  vertices: readonly Point3[];
  pointer: Point2 | null;
  snappedTo: "vertex" | "right angle" | "grid" | null;
  heightText: string;
  change: Change;
  circuit: TraceFor | null;
  supplyKind: Supply["kind"];
  currentText: string;
  problem: string | null;
}

/** Nearer than this in plan two presses are at the same place. */
const samePlaceM = 0.001;

const heightOf = (state: State): number | null => {
  const heightM = readNumber(state.heightText);
  return heightM === null || Math.abs(heightM) > 100_000 ? null : heightM;
};

function instructionOf(state: State): string {
  const { vertices, circuit } = state;
  const whose = circuit === null ? "the route" : circuit.name;
  const last = vertices.at(-1);
  if (last === undefined) return `Press where ${whose} begins, at the height given here. Escape abandons.`;
  const heightM = heightOf(state);
  if (heightM !== null && heightM !== last[2]) {
    const how = state.change === "riser" ? "rises or drops straight here" : "slopes to the next point";
    return `From ${numberText(last[2])} m to ${numberText(heightM)} m: the route ${how}. Press the next point, or this one again for a riser alone; Backspace takes a point back.`;
  }
  const soFar = `${pathLengthM(vertices).toFixed(2)} m so far`;
  return vertices.length < 2
    ? "Press the next point of the route; change the height for a riser. Backspace takes a point back, Escape abandons."
    : `Press the next point, or Enter to finish (${soFar}). Backspace takes a point back, Escape abandons.`;
}

function inputsOf(state: State): StepInput[] {
  const { heightText, change, circuit, supplyKind, currentText, problem, vertices } = state;
  const last = vertices.at(-1);
  const heightM = heightOf(state);
  const inputs: StepInput[] = [
    {
      id: "height",
      label: "Height",
      value: heightText,
      unit: "m",
      ...(heightM === null && { problem: "Type a height in metres above the finished floor, such as 2.8." }),
    },
  ];
  if (last !== undefined && heightM !== null && heightM !== last[2]) {
    inputs.push({
      id: "change",
      label: "Change of height",
      value: change,
      choices: [
        { value: "riser", label: "riser here" },
        { value: "slope", label: "slope to the next point" },
      ],
    });
  }
  if (circuit !== null) return inputs;
  return [
    ...inputs,
    {
      id: "supply",
      label: "Supply",
      value: supplyKind,
      choices: [
        { value: "dc", label: "DC" },
        { value: "ac1", label: "AC, one phase" },
        { value: "ac3", label: "AC, three phases" },
      ],
    },
    {
      id: "current",
      label: "Current, if known",
      value: currentText,
      unit: "A",
      ...(problem !== null && { problem }),
    },
  ];
}

function marksOf({ vertices, pointer, snappedTo }: State): Mark[] {
  const flat = vertices.map(flatOf);
  const last = flat.at(-1);
  return [
    ...(flat.length > 1 ? [{ kind: "line", points: flat, tone: "trace" } as const] : []),
    ...(last !== undefined && pointer !== null
      ? [{ kind: "line", points: [last, pointer], tone: "guide" } as const]
      : []),
    ...flat.map((at): Mark => ({ kind: "point", at, tone: "trace" })),
    ...(pointer !== null && snappedTo === "vertex" ? [{ kind: "ring", at: pointer } as const] : []),
    ...(last !== undefined && pointer !== null && distanceM(last, pointer) > 0
      ? [{ kind: "label", at: pointer, text: `${distanceM(last, pointer).toFixed(2)} m` } as const]
      : []),
  ];
}

function press(state: State, pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult {
  const { vertices } = state;
  const snapped = snapHere(pointM, modifiers, around, vertices);
  const last = vertices.at(-1);
  if (last === undefined) {
    const heightM = snapped.heightM ?? heightOf(state);
    if (heightM === null) return going(stepIn(state));
    const heightText = numberText(heightM);
    return going(stepIn({ ...state, vertices: [[...snapped.at, heightM]], heightText, pointer: null }));
  }
  const heightM = heightOf(state);
  if (heightM === null) return going(stepIn(state));
  const here =
    distanceM(flatOf(last), snapped.at) < samePlaceM || distanceM(flatOf(last), pointM) < around.reachM / 4;
  if (here) {
    if (heightM === last[2]) return vertices.length > 1 ? finish(state, around) : going(stepIn(state));
    return going(stepIn({ ...state, vertices: [...vertices, [last[0], last[1], heightM]] }));
  }
  const riser: Point3[] =
    heightM !== last[2] && state.change === "riser" ? [[last[0], last[1], heightM]] : [];
  const next: Point3 = [...snapped.at, heightM];
  return going(stepIn({ ...state, vertices: [...vertices, ...riser, next], pointer: null }));
}

/** The supply typed on the instruction line; undefined where the text is no current. */
function typedSupply({ supplyKind, currentText }: State): Supply | null | undefined {
  if (currentText.trim() === "") return null;
  const currentA = readNumber(currentText);
  if (currentA === null || Math.abs(currentA) > 1_000_000) return undefined;
  if (supplyKind !== "dc" && currentA < 0) return undefined;
  return supplyOf(supplyKind, { kind: "dc", currentA });
}

function finish(state: State, { document }: { document: PlanDocument }): StepResult {
  if (state.vertices.length < 2) return going(stepIn(state));
  const supply = state.circuit === null ? typedSupply(state) : null;
  if (supply === undefined) {
    const problem = "Type a current in amperes (AC without a sign), or leave it empty while it is not known.";
    return going(stepIn({ ...state, problem }));
  }
  const traced = traceCircuit(document, {
    path: state.vertices,
    circuitId: state.circuit?.id ?? null,
    supply,
  });
  return {
    kind: "finished",
    label: state.circuit === null ? "Trace route" : `Trace ${state.circuit.name}`,
    document: traced.document,
    select: [{ kind: "circuit", id: traced.circuitId }],
  };
}

function typed(state: State, inputId: string, text: string): State {
  if (inputId === "height") return { ...state, heightText: text };
  if (inputId === "change") return { ...state, change: text === "slope" ? "slope" : "riser" };
  if (inputId === "supply") {
    return { ...state, supplyKind: text === "ac1" || text === "ac3" ? text : "dc", problem: null };
  }
  return { ...state, currentText: text, problem: null };
}

function stepIn(state: State): Step {
  return stepOf({
    name: "trace-route",
    instruction: instructionOf(state),
    inputs: inputsOf(state),
    focus: state.problem === null ? null : "current",
    marks: marksOf(state),
    press: (pointM, modifiers, around) => press(state, pointM, modifiers, around),
    move: (pointM, modifiers, around) => {
      const { at, to } = snapHere(pointM, modifiers, around, state.vertices);
      return going(stepIn({ ...state, pointer: at, snappedTo: to }));
    },
    type: (inputId, text) => going(stepIn(typed(state, inputId, text))),
    key: (key, _modifiers, around) => {
      if (key === "Enter") return finish(state, around);
      if (key === "Backspace") return going(stepIn({ ...state, vertices: state.vertices.slice(0, -1) }));
      return null;
    },
  });
}

/** Vertices one after another at a height make a route, with the circuit that runs in it. */
export const beginTraceRoute = (circuit: TraceFor | null, heightM: number): Step =>
  stepIn({
    vertices: [],
    pointer: null,
    snappedTo: null,
    heightText: numberText(heightM),
    change: "riser",
    circuit,
    supplyKind: "dc",
    currentText: "",
    problem: null,
  });
