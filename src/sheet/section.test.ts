import { describe, expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { crossingsAt, heightRange, liftRun } from "./section";

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
});
