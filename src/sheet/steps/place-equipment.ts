import type { EquipmentKind } from "~/domain/plan-document/equipment";
import { addEquipment, equipmentStems, equipmentTitles, equipmentWords } from "../edits/equipment";
import { beginDraft, draftInputs, readDraft, typeDraft, type EquipmentDraft } from "../edits/equipment-draft";
import { freeName } from "../edits/ids";
import type { Point2 } from "../geometry";
import { numberText, readNumber } from "../read-number";
import { snapHere } from "./snap-here";
import { going, stepOf, type Step, type StepInput, type StepResult, type Surroundings } from "./step";

interface State {
  draft: EquipmentDraft;
  heightText: string;
  pointer: Point2 | null;
  /** Where it goes once every figure is typed. */
  at: Point2 | null;
}

function place(state: State, at: Point2, around: Surroundings): StepResult {
  const { document } = around;
  const heightM = readNumber(state.heightText);
  if (heightM === null || Math.abs(heightM) > 100_000) return going(stepIn({ ...state, at }, "height"));
  const name = freeName(equipmentStems[state.draft.kind], document.equipment);
  const read = readDraft(state.draft, name, [...at, heightM]);
  if (!read.ok) {
    const [first] = Object.keys(read.draft.problems);
    return going(stepIn({ ...state, at, draft: read.draft }, first ?? null));
  }
  return {
    kind: "finished",
    label: `Place ${name}`,
    document: addEquipment(document, read.item),
    select: [{ kind: "equipment", id: read.item.id }],
  };
}

function heightInput({ heightText }: State): StepInput {
  return {
    id: "height",
    label: "Height of its middle",
    value: heightText,
    unit: "m",
    ...(readNumber(heightText) === null && {
      problem: "Type a height in metres above the finished floor, such as 0.4.",
    }),
  };
}

function instructionOf({ at, draft }: State): string {
  if (at !== null) return "Type the figures that are missing, then press Enter to place it. Escape abandons.";
  const what = draft.kind === "dipole" ? "the dipole" : `the ${equipmentWords[draft.kind]}`;
  return `Press where the middle of ${what} goes, at the height given here. Escape abandons.`;
}

function stepIn(state: State, focus: string | null = null): Step {
  const { draft, pointer, at } = state;
  const shown = at ?? pointer;
  const withoutVertices = (around: Surroundings) => ({
    ...around,
    snap: { ...around.snap, vertices: false },
  });
  return stepOf({
    name: "place-equipment",
    instruction: instructionOf(state),
    inputs: [...draftInputs(draft), heightInput(state)],
    focus,
    marks:
      shown === null
        ? []
        : [
            { kind: "ring", at: shown },
            ...(at === null ? [] : [{ kind: "label", at, text: equipmentTitles[draft.kind] } as const]),
          ],
    press: (pointM, modifiers, around) =>
      place(state, snapHere(pointM, modifiers, withoutVertices(around)).at, around),
    move: (pointM, modifiers, around) =>
      going(stepIn({ ...state, pointer: snapHere(pointM, modifiers, withoutVertices(around)).at })),
    type: (inputId, text) =>
      going(
        stepIn(
          inputId === "height"
            ? { ...state, heightText: text }
            : { ...state, draft: typeDraft(draft, inputId, text) },
        ),
      ),
    key: (key, _modifiers, around) => (key === "Enter" && at !== null ? place(state, at, around) : null),
  });
}

/** One press puts a coil, toroid or dipole on the plan; figures that are missing are asked for before it stands there. */
export const beginPlaceEquipment = (kind: EquipmentKind, heightM: number): Step =>
  stepIn({ draft: beginDraft(kind), heightText: numberText(heightM), pointer: null, at: null });
