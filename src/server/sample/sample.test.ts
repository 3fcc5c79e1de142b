import { expect, it } from "vitest";
import { sampleCurrentsA, sampleFor, sampleSpacingsM } from "./sample";

const verdicts = (query: string) =>
  sampleFor(new URLSearchParams(query)).result.sensors.map(({ id, verdict }) => `${id} ${verdict}`);

it("shows a position of each verdict at first, with nothing open or warned of", () => {
  const { document, result } = sampleFor(new URLSearchParams());
  expect(verdicts("")).toEqual([
    "dock-1 undecided",
    "dock-2 over",
    "pillar over",
    "bench within",
    "microscope within",
  ]);
  expect(result.sensors).toHaveLength(document.sensors.length);
  expect(result.checks).toMatchObject({ openEnds: [], warnings: [] });
});

it("is cleared by laying the string's conductors close together", () => {
  expect(new Set(verdicts("currentA=120&spacingM=0.03").map((line) => line.split(" ")[1]))).toEqual(
    new Set(["within"]),
  );
});

it("takes no choice but those offered, and screens each once in a process", () => {
  expect(sampleFor(new URLSearchParams("currentA=1e9&spacingM=-1")).choice).toEqual({
    currentA: 120,
    spacingM: 0.4,
  });
  for (const currentA of sampleCurrentsA)
    for (const spacingM of sampleSpacingsM) {
      const query = new URLSearchParams({ currentA: String(currentA), spacingM: String(spacingM) });
      expect(sampleFor(query).choice).toEqual({ currentA, spacingM });
      expect(sampleFor(query)).toBe(sampleFor(query));
    }
});
