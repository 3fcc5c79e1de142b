import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { blankCircuit } from "../edits/circuits";
import { emptyHistory, record, undo } from "../history";
import { StepBench } from "./bench";
import { beginSelect } from "./select";

const sensor = (id: string, x: number, y: number): PlanDocument["sensors"][number] => ({
  id,
  name: id,
  position: [x, y, 1],
  axis: null,
  positionToleranceM: 0,
  background: null,
  limits: [{ id: "1", kind: "static", limitT: 1e-6 }],
});

const document: PlanDocument = {
  ...emptyPlanDocument("Hall"),
  routes: [
    {
      id: "r1",
      name: "Tray",
      path: [
        [0, 0, 3],
        [5, 0, 3],
        [5, 0, 0],
        [5, 4, 0],
      ],
    },
  ],
  circuits: [{ ...blankCircuit("c1", "K1"), route: { id: "r1", placeM: [0, 0] } }],
  loadCases: [{ id: "l1", name: "Peak", factors: { c1: 0.5 } }],
  sensors: [sensor("s1", 2, 2), sensor("s2", 3, 2)],
};

const bench = (part: ConstructorParameters<typeof StepBench>[2] = {}) =>
  new StepBench(beginSelect(0), document, part);

describe("select and move", () => {
  it("selects what is pressed, and several with shift or a box", () => {
    expect(bench().press([2.05, 2]).selection).toEqual([{ kind: "sensor", id: "s1" }]);
    expect(bench().press([1, 0.05]).selection).toEqual([{ kind: "circuit", id: "c1" }]);
    const two = bench().press([2, 2]).release([2, 2]).press([3, 2], { shift: true }).release([3, 2]);
    expect(two.selection).toHaveLength(2);
    const boxed = bench().press([1, 1]).drag([3.5, 2.5]).release([3.5, 2.5]);
    expect(boxed.selection).toEqual([
      { kind: "sensor", id: "s1" },
      { kind: "sensor", id: "s2" },
    ]);
  });

  it("previews a drag and makes it one edit, one undo", () => {
    const dragging = bench().press([2, 2]).drag([2.5, 2.2]).drag([4.04, 2.97]);
    expect(dragging.step.preview?.sensors[0]?.position).toEqual([4, 3, 1]);
    const { document: moved, label } = dragging.release([4.04, 2.97]).finished;
    expect(moved.sensors[0]?.position).toEqual([4, 3, 1]);
    const history = record(emptyHistory, label, document, moved);
    expect(history.past).toHaveLength(1);
    expect(undo(history, moved)?.document).toEqual(document);
  });

  it("does not move on a press that only trembles, and puts back on Escape", () => {
    expect(bench().press([2, 2]).drag([2.02, 2.01]).release([2.02, 2.01]).result.kind).toBe("going");
    const escaped = bench().press([2, 2]).drag([4, 4]).key("Escape");
    expect(escaped.step.preview).toBeNull();
    expect(escaped.release([4, 4]).result.kind).toBe("going");
  });

  it("keeps a riser upright when one of its ends is dragged", () => {
    const { document: moved } = bench({ selection: [{ kind: "circuit", id: "c1" }] })
      .press([5, 0])
      .drag([6, 0.3])
      .release([6, 0.3]).finished;
    expect(moved.routes[0]?.path.slice(1, 3)).toEqual([
      [6, 0.3, 3],
      [6, 0.3, 0],
    ]);
  });

  it("moves by the grid with arrow keys, ten steps with shift, heights with Page Up", () => {
    const selection = [{ kind: "sensor", id: "s1" }] as const;
    const place = (key: string, shift = false) =>
      bench({ selection }).key(key, { shift }).finished.document.sensors[0]?.position;
    expect(place("ArrowRight")).toEqual([2.1, 2, 1]);
    expect(place("ArrowDown", true)).toEqual([2, 1, 1]);
    expect(place("PageUp")).toEqual([2, 2, 1.1]);
  });

  it("changes the height of one end of a riser alone", () => {
    const selection = [{ kind: "vertex", owner: { list: "routes", id: "r1" }, index: 2 }] as const;
    const { document: raised } = bench({ selection }).key("PageUp").finished;
    expect(raised.routes[0]?.path.map(([, , z]) => z)).toEqual([3, 3, 0.1, 0]);
  });

  it("deletes a circuit with its factors and its empty route", () => {
    const { document: left } = bench({ selection: [{ kind: "circuit", id: "c1" }] }).key("Delete").finished;
    expect(left.circuits).toEqual([]);
    expect(left.routes).toEqual([]);
    expect(left.loadCases[0]?.factors).toEqual({});
    expect(parsePlanDocument(JSON.parse(JSON.stringify(left)))).toMatchObject({ ok: true });
  });

  it("duplicates, and selects the copies", () => {
    const copied = bench({
      selection: [
        { kind: "sensor", id: "s1" },
        { kind: "circuit", id: "c1" },
      ],
    });
    const { document: grown, select } = copied.key("d", { ctrl: true }).finished;
    expect(grown.sensors).toHaveLength(3);
    expect(grown.circuits[1]).toMatchObject({ name: "K1 (copy)", route: { id: "r1", placeM: [0.1, 0] } });
    expect(select).toHaveLength(2);
    expect(parsePlanDocument(JSON.parse(JSON.stringify(grown)))).toMatchObject({ ok: true });
  });

  it("adds a vertex where a leg is pressed with ctrl, at its height there", () => {
    const { document: grown } = bench().press([5.02, 2], { ctrl: true }).finished;
    expect(grown.routes[0]?.path[3]).toEqual([5, 2, 0]);
  });
});
