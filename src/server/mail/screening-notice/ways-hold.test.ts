import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Finding } from "~/domain/screening-result";
import { type Judged, shareOfAllSources, shareOfSpender } from "~/domain/ways-to-clear";
import { screen } from "~/screening/screen";

const coordinate = fc.integer({ min: -30, max: 30 }).map((decimetres) => decimetres / 10);
const circuit = fc.record({
  isDc: fc.boolean(),
  currentA: fc.integer({ min: 20, max: 400 }),
  y: coordinate,
  z: coordinate,
});
const plan = fc.record({
  circuits: fc.array(circuit, { minLength: 1, maxLength: 4 }),
  unknownPhase: fc.constantFrom("worst-case" as const, "typical" as const),
  /** Limits as parts of the value that the plan gives, so that most findings are flagged. */
  part: fc.double({ min: 0.2, max: 1.1, noNaN: true }),
});

type Drawn = typeof plan extends fc.Arbitrary<infer T> ? T : never;

/** The plan with the limits given by kind, its circuits' currents times `shares`. */
function document({ circuits, unknownPhase }: Drawn, limits: number[], shares: number[] = []): PlanDocument {
  const [staticT = 1, alternatingT = 1, headingDeg = 1] = limits;
  const parsed = parsePlanDocument({
    format: "stillneedle-plan",
    version: 1,
    name: "Random",
    frame: { northBearingDeg: 25 },
    earthField: { mode: "stated", horizontalT: 1.8e-5, verticalT: 4.6e-5, declinationDeg: 3 },
    unknownPhase,
    circuits: circuits.map(({ isDc, currentA, y, z }, index) => ({
      id: `c${String(index)}`,
      name: `Circuit ${String(index)}`,
      path: [
        [-20, y, z],
        [20, y + index, z],
      ],
      arrangement: { kind: "pair", spacingM: 0.1 },
      conductorRadiusM: 0.006,
      supply: isDc
        ? { kind: "dc", currentA: currentA * (shares[index] ?? 1) }
        : { kind: "ac1", currentA: currentA * (shares[index] ?? 1), frequencyHz: 50 },
      strayCurrentA: 0,
      positionToleranceM: 0.02,
    })),
    sensors: [
      {
        id: "s",
        name: "Sensor",
        position: [0, 0, 4],
        positionToleranceM: 0.02,
        limits: [
          { kind: "static", limitT: staticT },
          { kind: "alternating", limitT: alternatingT, bandHz: [10, 1000] },
          { kind: "heading", limitDeg: headingDeg },
        ],
      },
    ],
  });
  if (!parsed.ok) throw new Error(parsed.faults.map(({ path, message }) => `${path}: ${message}`).join("\n"));
  return parsed.document;
}

const findingsOf = (screened: PlanDocument): Finding[] => screen(screened).sensors[0]?.findings ?? [];

/** Each flagged finding of a random plan, with what its circuits scaled by other shares would give. */
function forEachFlagged(
  check: (judged: Judged, rescreened: (shares: number[]) => Finding | undefined, circuits: number) => void,
): void {
  let flagged = 0;
  fc.assert(
    fc.property(plan, (drawn) => {
      const values = findingsOf(document(drawn, [1, 1, 180])).map(({ value }) => value);
      const limits = values.map((value) => (value > 0 ? Math.min(value * drawn.part, 180) : 1));
      const at = document(drawn, limits);
      const [sensor] = at.sensors;
      if (sensor === undefined) throw new Error("The plan has lost its sensor.");
      const result = screen(at);
      findingsOf(at).forEach((finding, index) => {
        if (finding.verdict === "within") return;
        flagged += 1;
        const rescreened = (shares: number[]) => findingsOf(document(drawn, limits, shares))[index];
        check({ document: at, result, sensor, finding }, rescreened, drawn.circuits.length);
      });
    }),
    { numRuns: 40, seed: 20 },
  );
  expect(flagged).toBeGreaterThan(30);
}

describe("what a notice says would clear a position", { timeout: 60_000 }, () => {
  it("is within its limit when all sources come down to the share that is named", () => {
    let named = 0;
    forEachFlagged((judged, rescreened, circuits) => {
      const share = shareOfAllSources(judged);
      if (share === null) return;
      named += 1;
      expect(share).toBeLessThanOrEqual(1);
      const cleared = rescreened(Array.from({ length: circuits }, () => Math.floor(share * 100) / 100));
      expect(cleared?.verdict).toBe("within");
    });
    expect(named).toBeGreaterThan(30);
  });

  it("is never within its limit while the largest spender alone stays above the share that is named", () => {
    let named = 0;
    forEachFlagged((judged, rescreened, circuits) => {
      const [largest] = [...judged.finding.contributions].sort((a, b) => b.part - a.part);
      if (largest === undefined || largest.part <= 0 || judged.finding.value <= judged.finding.limit) return;
      const share = shareOfSpender(judged, largest.part);
      if (share === null) return;
      named += 1;
      const spender = Number(largest.id.slice(1));
      const above = Math.min(1, Math.max(0, share) + 0.02);
      const shares = Array.from({ length: circuits }, (_, index) => (index === spender ? above : 1));
      expect(rescreened(shares)?.verdict).not.toBe("within");
    });
    expect(named).toBeGreaterThan(15);
  });
});
