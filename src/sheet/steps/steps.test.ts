import { describe, expect, it } from "vitest";
import type { EarthField } from "~/domain/plan-document/earth-field";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { blankCircuit } from "../edits/circuits";
import { layDrawing, sheetCorners } from "../edits/scale";
import { StepBench } from "./bench";
import { beginMeasure } from "./measure";
import { beginPlaceSensor } from "./place-sensor";
import { beginSetNorth } from "./set-north";
import { beginSetScale } from "./set-scale";
import { beginTraceRoute } from "./trace-route";

const empty = emptyPlanDocument("Hall");
const withImage = layDrawing(empty, { id: "d1", widthPx: 2000, heightPx: 1000 });

const expectSound = (document: PlanDocument) =>
  expect(parsePlanDocument(JSON.parse(JSON.stringify(document)))).toMatchObject({ ok: true });

describe("set scale", () => {
  it("takes two points and a known length; what is drawn stays where it is on the image", () => {
    const sensor = { id: "s1", name: "S", axis: null, positionToleranceM: 0, background: null };
    const before: PlanDocument = {
      ...withImage,
      sensors: [{ ...sensor, position: [4, 2, 1.1], limits: [{ id: "1", kind: "static", limitT: 1e-6 }] }],
    };
    const bench = new StepBench(beginSetScale(), before);
    bench.press([1, 1]).press([5, 1]);
    expect(bench.step.focus).toBe("length");
    const { document } = bench.type("length", "8,0").key("Enter").finished;
    expect(document.drawing.sheet?.metresPerPixel).toBeCloseTo(0.02, 12);
    expect(document.sensors[0]?.position).toEqual([8, 4, 1.1]);
    expect(document.drawing.scale).toEqual({ a: [2, 2], b: [10, 2], knownLengthM: 8 });
    expectSound(document);
  });

  it("says what is wrong with a length and stays", () => {
    const bench = new StepBench(beginSetScale(), withImage);
    bench.press([1, 1]).press([5, 1]).type("length", "-2").key("Enter");
    expect(bench.problemOf("length")).toContain("above 0");
  });

  it("takes a point back, and abandons on Escape", () => {
    const bench = new StepBench(beginSetScale(), withImage).press([1, 1]).press([5, 1]).key("Backspace");
    expect(bench.step.instruction).toContain("other end");
    expect(bench.key("Escape").result.kind).toBe("abandoned");
  });
});

describe("set north", () => {
  it("takes the direction between two presses as true north", () => {
    const east = new StepBench(beginSetNorth({ ...new StepBench(beginSetScale(), empty).around }), empty);
    expect(east.press([0, 0]).press([1, 0]).finished.document.frame.northBearingDeg).toBe(270);
  });

  it("takes a typed bearing", () => {
    const bench = new StepBench(beginSetNorth(new StepBench(beginSetScale(), empty).around), empty);
    expect(bench.type("bearing", "12,5").key("Enter").finished.document.frame.northBearingDeg).toBe(12.5);
  });
});

describe("trace route", () => {
  it("makes a route and a circuit with the current typed", () => {
    const bench = new StepBench(beginTraceRoute(null, 2.8), empty);
    bench.press([0.02, 0]).press([12, 0.04]).press([12.03, 6]);
    const { document, select } = bench.type("supply", "ac3").type("current", "400").key("Enter").finished;
    expect(document.routes[0]?.path).toEqual([
      [0, 0, 2.8],
      [12, 0, 2.8],
      [12, 6, 2.8],
    ]);
    const [circuit] = document.circuits;
    expect(circuit).toMatchObject({
      arrangement: { kind: "trefoil" },
      supply: { kind: "ac3", currentA: 400, frequencyHz: 50 },
      route: { id: document.routes[0]?.id },
    });
    expect(select).toEqual([{ kind: "circuit", id: circuit?.id }]);
    expectSound(document);
  });

  it("puts a riser where the height changes, at the same place or before the next point", () => {
    const bench = new StepBench(beginTraceRoute(null, 2.8), empty);
    bench.press([0, 0]).press([2, 0]).type("height", "0,3").press([2, 0]).press([2, 3]);
    bench.type("height", "1").press([5, 3]);
    expect(bench.key("Enter").finished.document.routes[0]?.path).toEqual([
      [0, 0, 2.8],
      [2, 0, 2.8],
      [2, 0, 0.3],
      [2, 3, 0.3],
      [2, 3, 1],
      [5, 3, 1],
    ]);
  });

  it("slopes where that is chosen", () => {
    const bench = new StepBench(beginTraceRoute(null, 0), empty).press([0, 0]).type("height", "2");
    expect(bench.step.instruction).toContain("rises or drops straight here");
    bench.type("change", "slope");
    expect(bench.step.instruction).toContain("slopes to the next point");
    bench.press([4, 0]);
    expect(bench.key("Enter").finished.document.routes[0]?.path).toEqual([
      [0, 0, 0],
      [4, 0, 2],
    ]);
  });

  it("takes back with Backspace, finishes on a second press at the end, needs two points", () => {
    const bench = new StepBench(beginTraceRoute(null, 1), empty).press([0, 0]).key("Enter");
    expect(bench.result.kind).toBe("going");
    bench.press([3, 0]).press([3, 3]).key("Backspace").press([3, 0]);
    expect(bench.finished.document.routes[0]?.path).toHaveLength(2);
  });

  it("begins at the height of the vertex it snaps to", () => {
    const document: PlanDocument = {
      ...empty,
      routes: [
        {
          id: "r",
          name: "R",
          path: [
            [0, 0, 3.2],
            [9, 9, 3.2],
          ],
        },
      ],
    };
    const bench = new StepBench(beginTraceRoute(null, 1), document).press([0.03, 0.02]).press([5, 0]);
    expect(bench.key("Enter").finished.document.routes[1]?.path[1]).toEqual([5, 0, 3.2]);
  });

  it("traces a waiting circuit without asking for its current", () => {
    const waiting = { ...blankCircuit("c1", "K1"), supply: { kind: "dc" as const, currentA: 9 } };
    const bench = new StepBench(beginTraceRoute({ id: "c1", name: "K1" }, 1), {
      ...empty,
      circuits: [waiting],
    });
    expect(bench.step.inputs.map(({ id }) => id)).toEqual(["height"]);
    const { document } = bench.press([0, 0]).press([3, 0]).key("Enter").finished;
    expect(document.circuits).toHaveLength(1);
    expect(document.circuits[0]).toMatchObject({
      supply: { currentA: 9 },
      route: { id: document.routes[0]?.id },
    });
    expectSound(document);
  });

  it("refuses a current that is none, and says so at its input", () => {
    const bench = new StepBench(beginTraceRoute(null, 1), empty).press([0, 0]).press([3, 0]);
    bench.type("current", "plenty").key("Enter");
    expect(bench.problemOf("current")).toContain("amperes");
    expect(bench.step.focus).toBe("current");
  });
});

describe("place sensor", () => {
  const compass = {
    id: "k",
    name: "Compass",
    limits: [{ kind: "heading" as const, limitDeg: 1 }],
    source: "",
  };
  const siteEarth: EarthField = { mode: "stated", horizontalT: 1.8e-5, verticalT: 4.6e-5, declinationDeg: 3 };

  it("puts the kind's limits on the plan and selects the sensor", () => {
    const hall = { ...compass, name: "Hall probe", limits: [{ kind: "static" as const, limitT: 1e-5 }] };
    const bench = new StepBench(beginPlaceSensor([hall], "k", 1.1), empty)
      .type("height", "1,25")
      .press([4.02, 3]);
    const { document, select } = bench.finished;
    expect(document.sensors[0]).toMatchObject({
      name: "Hall probe 1",
      position: [4, 3, 1.25],
      limits: [{ id: "1", kind: "static", limitT: 1e-5 }],
    });
    expect(select).toEqual([{ kind: "sensor", id: document.sensors[0]?.id }]);
    expectSound(document);
  });

  it("brings the site's field of the Earth for a limit that needs it, and says so where there is none", () => {
    const lost = new StepBench(beginPlaceSensor([compass], "k", 1), empty).press([1, 1]);
    expect(lost.problemOf("kind")).toContain("Earth's field");
    const { document } = new StepBench(beginPlaceSensor([compass], "k", 1), empty, { siteEarth }).press([
      1, 1,
    ]).finished;
    expect(document.earthField).toEqual(siteEarth);
    expectSound(document);
  });
});

describe("measure", () => {
  it("says lengths and bearing and changes nothing", () => {
    const bench = new StepBench(beginMeasure(90), empty).press([0, 0]).move([3, 4]);
    expect(bench.step.instruction).toContain("5.000 m");
    expect(bench.step.instruction).toContain("bearing 126.9°");
    expect(bench.key("Enter").result.kind).toBe("abandoned");
  });

  it("holds on to the corners of the drawing", () => {
    const [corner] = sheetCorners(withImage.drawing.sheet as NonNullable<typeof withImage.drawing.sheet>);
    const bench = new StepBench(beginMeasure(0), withImage).press([corner[0] + 0.05, corner[1] - 0.05]);
    expect(bench.step.marks[0]).toMatchObject({ at: corner });
  });
});
