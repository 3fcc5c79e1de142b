import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Point2 } from "./geometry";
import { emptyHistory, extend, record, redo, undo, type History } from "./history";
import { stillThere, type Selection } from "./selection";
import type { Modifiers } from "./snapping";
import { beginSelect } from "./steps/select";
import type { Step, StepResult, Surroundings } from "./steps/step";

/** One person's work on a plan: what is drawn, how it came about, what is selected and which step is on. */
export interface Session {
  document: PlanDocument;
  history: History;
  selection: Selection;
  step: Step;
  /** Told to whoever can't see the drawing: what the last edit was. */
  announcement: string;
  /** What the last edit was, where the next one like it joins it in one undo; null after anything else. */
  joining: string | null;
}

export type PointerEventKind = "press" | "move" | "drag" | "release";

export const beginSession = (document: PlanDocument, history: History = emptyHistory): Session => ({
  document,
  history,
  selection: [],
  step: beginSelect(0),
  announcement: "",
  joining: null,
});

/** What shows: the document as the running drag would leave it. */
export const shownDocument = ({ document, step }: Session): PlanDocument => step.preview ?? document;

type Around = Omit<Surroundings, "document" | "selection">;

const surroundings = (session: Session, around: Around): Surroundings => ({
  ...around,
  document: session.document,
  selection: session.selection,
});

function take(session: Session, result: StepResult): Session {
  if (result.kind === "abandoned") {
    return { ...session, step: beginSelect(session.selection.length), announcement: "Step ended." };
  }
  if (result.kind === "going") {
    const selection = result.select ?? session.selection;
    return {
      ...session,
      step: result.step,
      selection,
      joining: selection === session.selection ? session.joining : null,
    };
  }
  const edited = edit(session, result.label, result.document, result.select, result.joins);
  return { ...edited, step: beginSelect(edited.selection.length) };
}

export const pointer = (
  session: Session,
  kind: PointerEventKind,
  pointM: Point2,
  modifiers: Modifiers,
  around: Around,
): Session => take(session, session.step[kind](pointM, modifiers, surroundings(session, around)));

export const keyPressed = (session: Session, key: string, modifiers: Modifiers, around: Around): Session =>
  take(session, session.step.key(key, modifiers, surroundings(session, around)));

export const typed = (session: Session, inputId: string, text: string, around: Around): Session =>
  take(session, session.step.type(inputId, text, surroundings(session, around)));

/** Begins a step; whatever step was on is abandoned. */
export const beginStep = (
  session: Session,
  begin: (around: Surroundings) => Step,
  around: Around,
): Session => ({
  ...session,
  step: begin(surroundings(session, around)),
});

export const select = (session: Session, selection: Selection): Session => ({
  ...session,
  selection,
  joining: null,
  step: session.step.name === "select" ? beginSelect(selection.length) : session.step,
});

/** Makes an edit and its checkpoint; one that `joins` the edit before it is undone with it. */
export function edit(
  session: Session,
  label: string,
  document: PlanDocument,
  selection?: Selection,
  joins?: string,
): Session {
  const joined = joins !== undefined && joins === session.joining;
  const history = (joined ? extend : record)(session.history, label, session.document, document);
  if (history === session.history) return selection === undefined ? session : select(session, selection);
  const kept = stillThere(document, selection ?? session.selection);
  const edited = select({ ...session, document, history, announcement: `${label}: done.` }, kept);
  return { ...edited, joining: joins ?? null };
}

export function undoLast(session: Session): Session {
  const stepped = undo(session.history, session.document);
  return stepped === null ? session : afterHistory(session, stepped, "Undone");
}

export function redoNext(session: Session): Session {
  const stepped = redo(session.history, session.document);
  return stepped === null ? session : afterHistory(session, stepped, "Redone");
}

function afterHistory(
  session: Session,
  stepped: { document: PlanDocument; history: History; label: string },
  word: string,
): Session {
  const { document, history, label } = stepped;
  const selection = stillThere(document, session.selection);
  return { ...select({ ...session, document, history }, selection), announcement: `${word}: ${label}.` };
}

/** Takes in what was merged with somebody else's save as an edit of its own, so that it can be undone too. */
export const adopt = (session: Session, document: PlanDocument): Session =>
  edit(session, "Take in the other person's changes", document);
