import type { EarthField } from "~/domain/plan-document/earth-field";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Point2 } from "../geometry";
import type { Selection } from "../selection";
import type { Modifiers, SnapSettings } from "../snapping";

export const stepNames = [
  "select",
  "set-scale",
  "set-north",
  "trace-route",
  "place-sensor",
  "place-equipment",
  "measure",
  "section-line",
  "datum",
  "mark",
  "mounting-zone",
  "clamp-loop",
] as const;
export type StepName = (typeof stepNames)[number];

export const stepTitles: Record<StepName, string> = {
  select: "Select and move",
  "set-scale": "Set scale",
  "set-north": "Set north",
  "trace-route": "Trace route",
  "place-sensor": "Place sensor",
  "place-equipment": "Place equipment",
  measure: "Measure",
  "section-line": "Section line",
  datum: "Datum",
  mark: "Mark",
  "mounting-zone": "Mounting zone",
  "clamp-loop": "Clamp-meter loop",
};

/** What a step reads of the sheet at each event. */
export interface Surroundings {
  document: PlanDocument;
  selection: Selection;
  snap: SnapSettings;
  /** How near in metres the pointer has to come to something to take hold of it. */
  reachM: number;
  /** The Earth's field at the site, for limits that need it; null where the site has no place. */
  siteEarth: EarthField | null;
}

/** An input on the instruction line. `value` is the text in it. */
export interface StepInput {
  id: string;
  label: string;
  value: string;
  unit?: string;
  /** Given for a choice instead of a free text. */
  choices?: readonly { value: string; label: string }[];
  /** What is wrong with the text and how to mend it. */
  problem?: string;
}

/** What a step draws over the plan, in metres. */
export type Mark =
  | { kind: "line"; points: readonly Point2[]; tone: "trace" | "guide" | "measure" }
  | { kind: "point"; at: Point2; tone: "trace" | "guide" | "measure" }
  | { kind: "ring"; at: Point2 }
  | { kind: "box"; from: Point2; to: Point2 }
  | { kind: "label"; at: Point2; text: string };

/** The one way out of a step, or the step as it goes on. */
export type StepResult =
  | { kind: "going"; step: Step; select?: Selection }
  | {
      kind: "finished";
      label: string;
      document: PlanDocument;
      select?: Selection;
      /** Edits of one kind that come in a row are one undo: arrow keys, say. */
      joins?: string;
    }
  | { kind: "abandoned" };

/**
 * A step of the sheet: a small state machine. Each event answers with the step as it then stands, or with its way out:
 * finished with the edited document, or abandoned. Places are metres in the plan frame, not snapped yet.
 */
export interface Step {
  readonly name: StepName;
  /** What the next click or key does. */
  readonly instruction: string;
  readonly inputs: readonly StepInput[];
  /** The input that the keyboard should stand in now; null leaves it where it is. */
  readonly focus: string | null;
  readonly marks: readonly Mark[];
  /** The document as it would be if the drag ended here; null while nothing is being dragged. */
  readonly preview: PlanDocument | null;
  press(pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult;
  move(pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult;
  drag(pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult;
  release(pointM: Point2, modifiers: Modifiers, around: Surroundings): StepResult;
  key(key: string, modifiers: Modifiers, around: Surroundings): StepResult;
  type(inputId: string, text: string, around: Surroundings): StepResult;
}

export const abandoned: StepResult = { kind: "abandoned" };

/** A step from what its machine does; what is left out changes nothing, and Escape abandons. */
export function stepOf(
  parts: Pick<Step, "name" | "instruction"> &
    Partial<Omit<Step, "name" | "instruction" | "key">> & {
      key?: (key: string, modifiers: Modifiers, around: Surroundings) => StepResult | null;
    },
): Step {
  const stay = (): StepResult => ({ kind: "going", step });
  const { key, ...rest } = parts;
  const step: Step = {
    inputs: [],
    focus: null,
    marks: [],
    preview: null,
    press: stay,
    move: stay,
    drag: stay,
    release: stay,
    type: stay,
    ...rest,
    key: (pressed, modifiers, around) =>
      key?.(pressed, modifiers, around) ?? (pressed === "Escape" ? abandoned : stay()),
  };
  return step;
}

export const going = (step: Step, select?: Selection): StepResult => ({
  kind: "going",
  step,
  ...(select && { select }),
});
