import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { placeLabels } from "./label-places";

const style = { clearPx: 17, linePx: 16, letterPx: 7 };

describe("labels", () => {
  it("stand to the right where there is room, else elsewhere, else nowhere", () => {
    expect(placeLabels([{ id: "a", at: [0, 0], text: "Compass" }], style).get("a")).toEqual([17, -8]);
    const row = [0, 40].map((x) => ({ id: String(x), at: [x, 0] as const, text: "Compass" }));
    expect(placeLabels(row, style).get("0")).toEqual([-66, -8]);
    const crowd = Array.from({ length: 9 }, (_, i) => ({
      id: String(i),
      at: [(i % 3) * 30, Math.floor(i / 3) * 30] as const,
      text: "Compass",
    }));
    expect(placeLabels(crowd, style).size).toBeLessThan(9);
  });

  it("never lie over each other", () => {
    const things = fc.array(fc.tuple(fc.integer({ min: 0, max: 400 }), fc.integer({ min: 0, max: 400 })), {
      maxLength: 20,
    });
    fc.assert(
      fc.property(things, (points) => {
        const labelled = points.map(([x, y], i) => ({
          id: String(i),
          at: [x, y] as const,
          text: "Hall probe",
        }));
        const boxes = [...placeLabels(labelled, style)].map(([id, [dx, dy]]) => {
          const [x, y] = points[Number(id)] as [number, number];
          return { x: x + dx, y: y + dy };
        });
        boxes.forEach((a, i) =>
          boxes.slice(i + 1).forEach((b) => {
            expect(Math.abs(a.x - b.x) >= 70 || Math.abs(a.y - b.y) >= 16).toBe(true);
          }),
        );
      }),
    );
  });
});
