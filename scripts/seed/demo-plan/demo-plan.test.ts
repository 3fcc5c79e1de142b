import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "../../../src/domain/plan-document/parse";
import { planDocumentSchema } from "../../../src/domain/plan-document/plan-document";
import type { ScreeningResult } from "../../../src/domain/screening-result";
import { screen } from "../../../src/screening/screen";
import { demoPlan } from "./demo-plan";

const inputOf = (date: string) =>
  demoPlan(
    { id: crypto.randomUUID() },
    { mode: "model", latitudeDeg: 54.2, longitudeDeg: 7.9, altitudeM: 10, date },
  );
const documentOf = (date: string) => planDocumentSchema.parse(inputOf(date));
const document = documentOf("2026-12-01");

/** What one must be able to see on the first visit: who is at fault for each flagged position. */
const flagged: Record<string, [verdict: string, spender: string]> = {
  "dock-1": ["over", "dock-supply-1"],
  "dock-3": ["undecided", "dock-supply-2"],
  lane: ["over", "dock-supply-1"],
  pillar: ["over", "hall-feeder"],
  microscope: ["undecided", "transformer-t2"],
};

describe("the demo's plan", () => {
  it("has no fault", () => {
    expect(parsePlanDocument(inputOf("2026-12-01"))).toMatchObject({ ok: true });
  });

  it("has positions of every verdict, each flagged one for a reason that one can see", () => {
    const { sensors, verdict } = screen(document);
    expect(verdict).toBe("over");
    expect(sensors.filter((sensor) => sensor.verdict === "within").length).toBeGreaterThan(5);
    const seen = sensors
      .filter((sensor) => sensor.verdict !== "within")
      .map(({ id, verdict: word, findings }) => {
        const worst = findings.reduce((one, other) => (other.budgetUsed > one.budgetUsed ? other : one));
        const [most] = [...worst.contributions].sort((one, other) => other.part - one.part);
        return [id, [word, most?.id]];
      });
    expect(Object.fromEntries(seen)).toEqual(flagged);
  });

  it.each(["2026-01-01", "2029-11-01"])(
    "has the same verdicts on %s, for it is seeded on any day",
    (date) => {
      const verdicts = ({ sensors }: ScreeningResult) => sensors.map(({ verdict }) => verdict);
      expect(verdicts(screen(documentOf(date)))).toEqual(verdicts(screen(document)));
    },
  );

  it("leaves open only the net current that its note tells of", () => {
    const { openEnds } = screen(document).checks;
    expect(openEnds.map(({ circuitIds, currentA }) => [circuitIds, currentA])).toEqual([
      [["hall-feeder"], 1.4],
      [["hall-feeder"], 1.4],
    ]);
  });

  it("lies within the building that the floor plan shows", () => {
    const points = [
      ...document.sensors.map(({ position }) => position),
      ...document.equipment.map(({ centre }) => centre),
      ...document.routes.flatMap(({ path }) => path),
      ...document.circuits.flatMap(({ path }) => path ?? []),
    ];
    for (const [x, y, z] of points) {
      expect(x).toBeGreaterThan(0.4);
      expect(x).toBeLessThan(47.6);
      expect(y).toBeGreaterThan(0.4);
      expect(y).toBeLessThan(29.6);
      expect(z).toBeLessThanOrEqual(6);
    }
  });
});
