import { describe, expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { crossingsAt, heightRange, liftRun, sectionFrame, sectionGrid, strip } from "./section";
import { sliceOf, type Slice } from "./slice";

const document: PlanDocument = {
  ...emptyPlanDocument("Hall"),
  routes: [
    {
      id: "r",
      name: "Tray",
      path: [
        [0, 0, 2],
        [4, 8, 4],
        [9, 8, 4],
        [9, 8, -1],
      ],
    },
  ],
};
const atY = (y: number): Slice => ({ origin: [0, y], along: [1, 0], centreM: 0, line: null, through: null });
const owner = { list: "routes", id: "r" } as const;

describe("the section", () => {
  it("finds where legs pass through the slice, at their height there", () => {
    expect(crossingsAt(document, atY(2))).toEqual([{ owner, name: "Tray", leg: 0, at: [1, 2.5] }]);
    expect(crossingsAt(document, atY(9))).toEqual([]);
  });

  it("does not count a leg that lies in the slice, only what leaves it", () => {
    expect(crossingsAt(document, atY(8)).map(({ leg }) => leg)).toEqual([0]);
  });

  it("shows all heights and an ordinary room at least", () => {
    expect(heightRange(document)).toEqual({ lowM: -1, highM: 4 });
    expect(heightRange(emptyPlanDocument("Hall"))).toEqual({ lowM: 0, highM: 3 });
  });

  it("lifts a level run whole", () => {
    expect(liftRun(document, owner, 1, 0.5).routes[0]?.path.map(([, , z]) => z)).toEqual([2, 4.5, 4.5, -1]);
    expect(liftRun(document, owner, 7, 0.5)).toBe(document);
  });

  it("runs along a drawn line, whichever way it points", () => {
    const lined: PlanDocument = {
      ...document,
      drawing: { sectionLines: [{ id: "q", name: "A to A", a: [2, 12], b: [2, 0] }] },
    };
    const slice = sliceOf(
      lined,
      { kind: "section-line", id: "q" },
      { scale: 1, x: 0, y: 0 },
      { width: 9, height: 9 },
    );
    expect(slice).toMatchObject({
      along: [0, -1],
      centreM: 6,
      line: { fromM: 0, toM: 12 },
      through: "A to A",
    });
    // The first leg passes x = 2 half way along it, at y = 4: 8 m along the line from y = 12, at a height of 3 m.
    expect(crossingsAt(lined, slice)).toEqual([{ owner, name: "Tray", leg: 0, at: [8, 3] }]);
    expect(
      sectionGrid(
        sectionFrame(
          lined,
          { kind: "section-line", id: "q" },
          { scale: 1, x: 0, y: 0 },
          { width: 9, height: 9 },
        ),
        100,
        10,
      ).origin[0],
    ).toBe(2);
  });

  it("goes through the selected sensor, else through the middle of the view", () => {
    const sensors: PlanDocument["sensors"] = [
      {
        id: "s1",
        name: "Compass",
        position: [3, 5, 1],
        axis: null,
        positionToleranceM: 0,
        background: null,
        limits: [{ id: "1", kind: "static", limitT: 1e-6 }],
      },
    ];
    const view = { scale: 10, x: 0, y: 100 };
    const size = { width: 200, height: 100 };
    const through = sectionFrame({ ...document, sensors }, { kind: "sensor", id: "s1" }, view, size);
    expect(through).toMatchObject({
      slice: { origin: [0, 5], along: [1, 0], centreM: 3, through: "Compass" },
      lowM: -1,
      highM: 4,
    });
    expect(sectionFrame(document, null, view, size)).toMatchObject({
      slice: { origin: [0, 5], centreM: 10, through: null },
    });
    const grid = sectionGrid(through, 800, 30);
    expect((grid.rows - 1) * grid.stepM * through.scale).toBeCloseTo(strip.heightPx);
    expect((grid.columns - 1) * grid.stepM * through.scale).toBeGreaterThanOrEqual(800);
  });
});
