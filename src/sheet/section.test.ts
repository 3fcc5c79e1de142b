import { describe, expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { crossingsAt, heightRange, liftRun, sectionFrame, sectionGrid, strip } from "./section";

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
const owner = { list: "routes", id: "r" } as const;

describe("the section", () => {
  it("finds where legs pass through the slice, at their height there", () => {
    expect(crossingsAt(document, 2)).toEqual([{ owner, name: "Tray", leg: 0, at: [1, 2.5] }]);
    expect(crossingsAt(document, 9)).toEqual([]);
  });

  it("does not count a leg that lies in the slice, only what leaves it", () => {
    expect(crossingsAt(document, 8).map(({ leg }) => leg)).toEqual([0]);
  });

  it("shows all heights and an ordinary room at least", () => {
    expect(heightRange(document)).toEqual({ lowM: -1, highM: 4 });
    expect(heightRange(emptyPlanDocument("Hall"))).toEqual({ lowM: 0, highM: 3 });
  });

  it("lifts a level run whole", () => {
    expect(liftRun(document, owner, 1, 0.5).routes[0]?.path.map(([, , z]) => z)).toEqual([2, 4.5, 4.5, -1]);
    expect(liftRun(document, owner, 7, 0.5)).toBe(document);
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
    const through = sectionFrame({ ...document, sensors }, [{ kind: "sensor", id: "s1" }], view, size);
    expect(through).toMatchObject({ sliceY: 5, centreX: 3, sensorName: "Compass", lowM: -1, highM: 4 });
    expect(sectionFrame(document, [], view, size)).toMatchObject({
      sliceY: 5,
      centreX: 10,
      sensorName: null,
    });
    const grid = sectionGrid(through, 800, 30);
    expect((grid.rows - 1) * grid.stepM * through.scale).toBeCloseTo(strip.heightPx);
    expect((grid.columns - 1) * grid.stepM * through.scale).toBeGreaterThanOrEqual(800);
  });
});
