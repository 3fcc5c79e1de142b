import { expect, it } from "vitest";
import { sample } from "./sample";

it("shows a position of each verdict, with nothing open or warned of", () => {
  const { document, result } = sample();
  expect(result.sensors.map(({ id, verdict }) => [id, verdict])).toEqual([
    ["compass", "over"],
    ["head", "within"],
    ["monitor", "undecided"],
  ]);
  expect(result.sensors).toHaveLength(document.sensors.length);
  expect(result.checks).toMatchObject({ openEnds: [], warnings: [] });
});

it("is screened once in a process", () => {
  expect(sample()).toBe(sample());
});
