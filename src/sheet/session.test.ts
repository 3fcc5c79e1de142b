import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import type { Point2 } from "./geometry";
import {
  beginSession,
  beginStep,
  keyPressed,
  pointer,
  redoNext,
  shownDocument,
  undoLast,
  type Session,
} from "./session";
import { defaultSnap, noModifiers } from "./snapping";
import { beginPlaceSensor } from "./steps/place-sensor";
import { beginTraceRoute } from "./steps/trace-route";

const around = { snap: defaultSnap, reachM: 0.1, siteEarth: null };
const hall = { id: "k", name: "Hall probe", limits: [{ kind: "static" as const, limitT: 1e-5 }], source: "" };

const press = (session: Session, at: Point2) => pointer(session, "press", at, noModifiers, around);
const place = (session: Session, at: Point2) =>
  press(
    beginStep(session, () => beginPlaceSensor([hall], "k", 1), around),
    at,
  );
const trace = (session: Session, from: Point2, to: Point2) =>
  keyPressed(
    press(
      press(
        beginStep(session, () => beginTraceRoute(null, 3), around),
        from,
      ),
      to,
    ),
    "Enter",
    noModifiers,
    around,
  );
const drag = (session: Session, from: Point2, to: Point2) =>
  pointer(pointer(press(session, from), "drag", to, noModifiers, around), "release", to, noModifiers, around);

describe("a session", () => {
  it("goes back to selecting when a step has found its way out", () => {
    const placed = place(beginSession(emptyPlanDocument("Hall")), [2, 2]);
    expect(placed.step.name).toBe("select");
    expect(placed.document.sensors).toHaveLength(1);
    expect(placed.announcement).toBe("Place Hall probe 1: done.");
  });

  it("shows a drag while it lasts, and drops a step's work on Escape", () => {
    const placed = place(beginSession(emptyPlanDocument("Hall")), [2, 2]);
    const dragging = pointer(press(placed, [2, 2]), "drag", [5, 5], noModifiers, around);
    expect(shownDocument(dragging).sensors[0]?.position).toEqual([5, 5, 1]);
    expect(dragging.document.sensors[0]?.position).toEqual([2, 2, 1]);
    expect(shownDocument(keyPressed(dragging, "Escape", noModifiers, around))).toBe(placed.document);
  });

  it("forgets the selection of what an undo takes away", () => {
    const placed = place(beginSession(emptyPlanDocument("Hall")), [2, 2]);
    expect(placed.selection).toHaveLength(1);
    expect(undoLast(placed).selection).toHaveLength(0);
  });

  it("takes back several arrow keys in a row at once, but not across anything else", () => {
    const arrow = (session: Session) => keyPressed(session, "ArrowRight", noModifiers, around);
    const xOf = ({ document }: Session) => document.sensors[0]?.position[0];
    const placed = place(beginSession(emptyPlanDocument("Hall")), [2, 2]);
    const nudged = arrow(arrow(arrow(placed)));
    expect(xOf(nudged)).toBeCloseTo(2.3);
    expect(xOf(undoLast(nudged))).toBe(2);
    expect(xOf(redoNext(undoLast(nudged)))).toBeCloseTo(2.3);
    const again = arrow(drag(nudged, [2.3, 2], [5, 2]));
    expect(xOf(undoLast(again))).toBe(5);
    expect(xOf(undoLast(undoLast(again)))).toBeCloseTo(2.3);
  });

  it("equals its model under random edits, undos and redos", () => {
    const coordinates = fc.tuple(fc.integer({ min: 0, max: 20 }), fc.integer({ min: 0, max: 20 }));
    const actions = fc.array(
      fc.oneof(
        fc.record({ kind: fc.constant("place" as const), at: coordinates }),
        fc.record({ kind: fc.constant("trace" as const), at: coordinates, to: coordinates }),
        fc.record({ kind: fc.constant("drag" as const), at: coordinates, to: coordinates }),
        fc.record({ kind: fc.constant("delete" as const) }),
        fc.record({ kind: fc.constantFrom("undo" as const, "redo" as const) }),
      ),
      { maxLength: 40 },
    );
    fc.assert(
      fc.property(actions, (script) => {
        let session = beginSession(emptyPlanDocument("Hall"));
        // The model keeps whole documents where the session keeps differences.
        const documents: PlanDocument[] = [session.document];
        let at = 0;
        for (const action of script) {
          const before = session;
          if (action.kind === "place") session = place(session, action.at);
          else if (action.kind === "trace") session = trace(session, action.at, action.to);
          else if (action.kind === "drag") session = drag(session, action.at, action.to);
          else if (action.kind === "delete") session = keyPressed(session, "Delete", noModifiers, around);
          else if (action.kind === "undo") {
            session = undoLast(session);
            at = Math.max(0, at - 1);
          } else {
            session = redoNext(session);
            at = Math.min(documents.length - 1, at + 1);
          }
          if (action.kind !== "undo" && action.kind !== "redo" && session.history !== before.history) {
            documents.splice(at + 1, Infinity, session.document);
            at++;
          }
          session = keyPressed(session, "Escape", noModifiers, around);
          expect(session.document).toEqual(documents[at]);
        }
      }),
    );
  });
});
