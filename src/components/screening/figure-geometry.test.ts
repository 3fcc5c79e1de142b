import { describe, expect, it } from "vitest";
import {
  emptyPlanDocument,
  type PlanDocument,
  planDocumentSchema,
} from "~/domain/plan-document/plan-document";
import { figureFrame, figureLines, imageCorners, scaleBarM } from "./figure-geometry";

const circuit = (id: string, path: number[][], supply: object | null) => ({
  id,
  name: id,
  path,
  arrangement: { kind: "pair", spacingM: 0.03 },
  conductorRadiusM: 0.005,
  supply,
});

const plan = (part: object): PlanDocument =>
  planDocumentSchema.parse({ ...emptyPlanDocument("Hall"), ...part });

describe("the plan figure", () => {
  it("keeps the sheet's proportions, with y up the sheet", () => {
    const path = [
      [0, 0, 2],
      [20, 0, 2],
      [20, 10, 2],
    ];
    const frame = figureFrame(plan({ circuits: [circuit("c1", path, { kind: "dc", currentA: 10 })] }));
    const [x0, y0] = frame.place([0, 0]);
    const [x1, y1] = frame.place([20, 10]);
    expect((x1 - x0) / 20).toBeCloseTo((y0 - y1) / 10, 9);
    expect(y1).toBeLessThan(y0);
    expect(frame.width).toBeCloseTo(1200, 6);
  });

  it("draws circuits that share a way as one line, DC only where all of them are", () => {
    const way = [
      [0, 0, 2],
      [4, 0, 2],
      [4, 10, 2],
    ];
    const dc = { kind: "dc", currentA: 10 };
    const document = plan({
      circuits: [
        circuit("c1", way, dc),
        circuit("c2", way, dc),
        circuit("c3", [...way].reverse(), { kind: "ac1", currentA: 5, frequencyHz: 50 }),
        circuit("c4", [...way, [9, 9, 9]], null),
      ],
    });
    const frame = figureFrame(document);
    const lines = figureLines(document, frame);
    expect(lines.map(({ circuitIds, flow }) => [circuitIds, flow])).toEqual([
      [["c1", "c2"], "dc"],
      [["c3"], "ac"],
      [["c4"], "unknown"],
    ]);
    expect(lines[0]?.middle).toEqual(frame.place([4, 5]));
    expect(lines[0]?.middleAngleDeg).toBeCloseTo(-90, 9);
  });

  it("places the uploaded image by its origin, scale and turn", () => {
    const sheet = {
      drawingId: "d",
      widthPx: 200,
      heightPx: 100,
      originPx: [0, 100] as [number, number],
      metresPerPixel: 0.1,
    };
    expect(imageCorners({ sheet: { ...sheet, rotationDeg: 0 } })).toEqual([
      [0, 10],
      [0, 0],
      [20, 0],
      [20, 10],
    ]);
    const [upperLeft] = imageCorners({ sheet: { ...sheet, rotationDeg: 90 } });
    expect(upperLeft?.[0]).toBeCloseTo(-10, 9);
    expect(upperLeft?.[1]).toBeCloseTo(0, 9);
  });

  it("takes a round scale bar and a frame for an empty plan", () => {
    const frame = figureFrame(plan({}));
    expect(frame.width).toBeGreaterThan(0);
    expect(scaleBarM({ width: 960, height: 1, unitsPerM: 20, place: frame.place })).toBe(5);
    expect(scaleBarM({ width: 960, height: 1, unitsPerM: 100, place: frame.place })).toBe(1);
  });

  it("shows some of the image around what is drawn, but no more than there is", () => {
    const sheet = {
      drawingId: "d",
      widthPx: 1000,
      heightPx: 500,
      originPx: [0, 500],
      metresPerPixel: 0.1,
      rotationDeg: 0,
    };
    const path = [
      [40, 2, 2],
      [60, 20, 2],
    ];
    const frame = figureFrame(
      plan({ circuits: [circuit("c1", path, { kind: "dc", currentA: 1 })], drawing: { sheet } }),
    );
    expect(frame.place([34, 26])).toEqual([56, 56]);
    expect(frame.place([66, 0])).toEqual([
      expect.closeTo(frame.width - 56, 6),
      expect.closeTo(frame.height - 56, 6),
    ]);
  });
});
