import { expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { importedInto } from "./import-document";
import { layDrawing } from "./scale";

it("takes everything from the file but the plan's name and image", () => {
  const present = layDrawing(emptyPlanDocument("Here"), { id: "d1", widthPx: 100, heightPx: 100 });
  const foreign: PlanDocument = {
    ...layDrawing(emptyPlanDocument("There"), { id: "d2", widthPx: 50, heightPx: 50 }),
    routes: [
      {
        id: "r",
        name: "R",
        path: [
          [0, 0, 0],
          [1, 0, 0],
        ],
      },
    ],
  };
  const taken = importedInto(present, foreign);
  expect(taken).toMatchObject({ name: "Here", routes: foreign.routes });
  expect(taken.drawing.sheet).toEqual(present.drawing.sheet);
  expect(importedInto(emptyPlanDocument("Here"), foreign).drawing.sheet).toBeUndefined();
  const moved = { ...present, name: "Copy", drawing: { ...present.drawing, gridM: 0.5 } };
  expect(importedInto(present, moved).drawing).toEqual(moved.drawing);
});
