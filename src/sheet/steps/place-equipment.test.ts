import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { StepBench } from "./bench";
import { beginPlaceEquipment } from "./place-equipment";
import { beginSelect } from "./select";

const empty = emptyPlanDocument("Hall");
const expectSound = (document: PlanDocument) =>
  expect(parsePlanDocument(JSON.parse(JSON.stringify(document)))).toMatchObject({ ok: true });

const placed = (): PlanDocument =>
  new StepBench(beginPlaceEquipment("coil", 0.4), empty)
    .type("turns", "80")
    .type("current", "16")
    .press([3.02, 2]).finished.document;

describe("place equipment", () => {
  it("puts a coil where one presses, with its figures, and selects it", () => {
    const bench = new StepBench(beginPlaceEquipment("coil", 0.4), empty);
    const { document, select } = bench
      .type("turns", "80")
      .type("radius", "0,25")
      .type("current", "16")
      .press([3.02, 2]).finished;
    const [reel] = document.equipment;
    expect(reel).toMatchObject({
      name: "Reel 1",
      kind: "coil",
      centre: [3, 2, 0.4],
      turns: 80,
      radiusM: 0.25,
      axis: [0, 0, 1],
      supply: { kind: "dc", currentA: 16 },
    });
    expect(select).toEqual([{ kind: "equipment", id: reel?.id }]);
    expectSound(document);
  });

  it("asks for the figures that are missing and keeps the place meanwhile; no current is made up", () => {
    const bench = new StepBench(beginPlaceEquipment("toroid", 1), empty).press([5, 5]);
    expect(bench.problemOf("current")).toContain("amperes");
    expect(bench.step.focus).toBe("turns");
    expect(bench.type("turns", "12.5").type("current", "3").key("Enter").problemOf("turns")).toContain(
      "whole",
    );
    bench.type("minor", "0.2").type("turns", "12").key("Enter");
    expect(bench.problemOf("minor")).toContain("mean radius");
    const { document } = bench.type("minor", "0.02").key("Enter").finished;
    expect(document.equipment[0]).toMatchObject({ kind: "toroid", centre: [5, 5, 1], turns: 12 });
    expectSound(document);
  });

  it("takes a dipole by its reading, in the units shown", () => {
    const bench = new StepBench(beginPlaceEquipment("coil", 1), empty).type("kind", "dipole");
    const { document } = bench.type("distance", "1.5").type("field", "0,8").press([1, 1]).finished;
    expect(document.equipment[0]).toMatchObject({
      kind: "dipole",
      reading: { distanceM: 1.5, fieldT: 8e-7 },
      frequencyHz: 0,
      direction: null,
    });
    expectSound(document);
  });

  it("refuses a negative rms current", () => {
    const bench = new StepBench(beginPlaceEquipment("coil", 1), empty).type("turns", "1");
    bench.type("supply", "ac1").type("current", "-4").press([0, 0]);
    expect(bench.problemOf("current")).toContain("rms");
    expect(bench.key("Escape").result.kind).toBe("abandoned");
  });
});

describe("equipment on the sheet", () => {
  it("is taken, moved, copied and deleted like a sensor, its factors with it", () => {
    const document = placed();
    const { id } = document.equipment[0] as { id: string };
    const loaded = { ...document, loadCases: [{ id: "l", name: "Off", factors: { [id]: 0 } }] };
    const bench = new StepBench(beginSelect(0), loaded).press([3, 2]);
    expect(bench.selection).toEqual([{ kind: "equipment", id }]);
    const moved = bench.drag([5, 4]).release([5, 4]).finished.document;
    expect(moved.equipment[0]?.centre).toEqual([5, 4, 0.4]);

    const at = { selection: [{ kind: "equipment", id }] as const };
    const copied = new StepBench(beginSelect(1), loaded, at).key("d", { ctrl: true }).finished;
    expect(copied.document.equipment.map(({ name }) => name)).toEqual(["Reel 1", "Reel 1 (copy)"]);
    expectSound(copied.document);
    const gone = new StepBench(beginSelect(1), loaded, at).key("Delete").finished.document;
    expect(gone.equipment).toEqual([]);
    expect(gone.loadCases[0]?.factors).toEqual({});
  });
});
