import { describe, expect, it } from "vitest";
import type { FigureLine, FigurePoint } from "./figure-geometry";
import { obstacleBoxes, placeBalloons, placeLabels } from "./figure-labels";

const line = (points: FigurePoint[], circuitIds: string[] = ["c"]): FigureLine => ({
  points,
  circuitIds,
  flow: "dc",
  middle: [0, 0],
  middleAngleDeg: 0,
});

const mark = (x: number, y: number, letters = 20) => ({ at: [x, y] as const, letters, shortLetters: 3 });
const frame = { width: 960 };
const radius = 15;

describe("labels of the plan figure", () => {
  it("puts labels of neighbours on different sides, inside the figure", () => {
    const [first, second, atEdge] = placeLabels(
      [mark(100, 100), mark(150, 100), mark(940, 100)],
      [],
      [],
      frame,
      radius,
    );
    expect(first).toMatchObject({ anchor: "middle", short: false });
    expect(second).toMatchObject({ anchor: "start", short: false });
    expect(atEdge).toMatchObject({ anchor: "end", short: false });
  });

  it("keeps labels off lines where it can", () => {
    const wall = line([
      [440, 0],
      [440, 300],
    ]);
    const [label] = placeLabels([mark(400, 100, 10)], [wall], [], frame, radius);
    expect(label?.anchor).toBe("end");
  });

  it("shows the number alone where there is no room", () => {
    const rows = [-2, -1, 1, 2].map((row) => 100 + 26 * row);
    const around = rows.flatMap((y) => [340, 360, 380, 400, 420, 440, 460].map((x): FigurePoint => [x, y]));
    const crowd = obstacleBoxes([...around, [350, 100], [450, 100]], 9);
    const [label] = placeLabels([mark(400, 100, 30)], [], crowd, frame, radius);
    expect(label).toMatchObject({ short: true });
  });
});

describe("balloons of the plan figure", () => {
  it("stand side by side on the longest leg and make way for those of another line", () => {
    const way: FigurePoint[] = [
      [0, 0],
      [200, 0],
      [200, 40],
    ];
    const [both, other] = placeBalloons([line(way, ["a", "b"]), line(way)], []);
    expect(both).toEqual([
      [88, 0],
      [112, 0],
    ]);
    expect(other).toEqual([[60, 0]]);
  });
});
