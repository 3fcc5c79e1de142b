import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { aidOf, aidsOf, fromDatum, toPlanFrame } from "../edits/aids";
import { slicedBy } from "../slice";
import { StepBench } from "./bench";
import { beginDrawAid } from "./draw-aid";
import { beginSelect } from "./select";

const empty = emptyPlanDocument("Hall");
const expectSound = (document: PlanDocument) =>
  expect(parsePlanDocument(JSON.parse(JSON.stringify(document)))).toMatchObject({ ok: true });

describe("drawing what people work by", () => {
  it("takes a section line by two presses, and the section then goes through it", () => {
    const bench = new StepBench(beginDrawAid("section-line", 0), empty).press([1, 1]).press([1.02, 1]);
    expect(bench.step.instruction).toContain("where it ends");
    const { document, select } = bench.press([1, 7]).finished;
    expect(document.drawing.sectionLines).toMatchObject([{ name: "Section 1", a: [1, 1], b: [1, 7] }]);
    expect(slicedBy(select ?? [])).toEqual({
      kind: "section-line",
      id: document.drawing.sectionLines?.[0]?.id,
    });
    expectSound(document);
  });

  it("keeps one datum, from which offsets are read and typed, and any number of marks", () => {
    const first = new StepBench(beginDrawAid("datum", 0), empty).press([2, 3]).finished.document;
    const { document } = new StepBench(beginDrawAid("datum", 0), first)
      .type("height", "0,5")
      .press([4, 3]).finished;
    expect(document.drawing.datum).toEqual({ name: "Datum", position: [4, 3, 0.5] });
    expect(fromDatum(document, [5, 5, 1.1])).toEqual([1, 2, 0.6]);
    expect(toPlanFrame(document, [1, 2, 0.6])).toEqual([5, 5, 1.1]);
    expect(fromDatum(empty, [5, 5, 1])).toBeNull();
    const marked = new StepBench(beginDrawAid("mark", 0), document).press([9, 9]).finished.document;
    expect(marked.drawing.marks).toMatchObject([{ name: "Mark 1", position: [9, 9, 0] }]);
    expectSound(marked);
  });

  it("closes a zone on Enter or on its first corner, not before it has three", () => {
    const bench = new StepBench(beginDrawAid("zone", 0), empty).press([0, 0]).press([4, 0]).key("Enter");
    expect(bench.result.kind).toBe("going");
    bench.press([4, 3]).press([9, 9]).key("Backspace").press([0.02, 0.03]);
    expect(bench.finished.document.drawing.zones).toMatchObject([
      {
        name: "Zone 1",
        outline: [
          [0, 0],
          [4, 0],
          [4, 3],
        ],
      },
    ]);
    expectSound(bench.finished.document);
  });

  it("lets a loop stand upright: corners one above the other", () => {
    const bench = new StepBench(beginDrawAid("loop", 2), empty).press([0, 0]).press([1, 0]);
    bench.type("height", "3").press([1, 0]).press([0, 0.3]).key("Enter");
    expect(bench.finished.document.drawing.loops?.[0]?.polygon).toEqual([
      [0, 0, 2],
      [1, 0, 2],
      [1, 0, 3],
      [0, 0.3, 3],
    ]);
    expectSound(bench.finished.document);
  });

  it("is selected by its line, moved and deleted", () => {
    const { document } = new StepBench(beginDrawAid("section-line", 0), empty)
      .press([0, 0])
      .press([6, 0]).finished;
    const [line] = aidsOf(document);
    const bench = new StepBench(beginSelect(0), document).press([3, 0.05]);
    expect(bench.selection).toEqual([{ kind: "aid", aid: "section-line", id: line?.id }]);
    const moved = bench.drag([3, 2.05]).release([3, 2.05]).finished.document;
    expect(aidOf(moved, "section-line", line?.id ?? "")?.points).toEqual([
      [0, 2, 0],
      [6, 2, 0],
    ]);
    const at = { selection: bench.selection };
    const gone = new StepBench(beginSelect(1), document, at).key("Delete").finished.document;
    expect(aidsOf(gone)).toEqual([]);
    expectSound(gone);
  });
});
