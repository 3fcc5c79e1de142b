import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "../../src/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "../../src/domain/plan-document/plan-document";
import { MU_0 } from "../../src/domain/units";
import { complianceDistances } from "../../src/screening/clearing/compliance-distances";
import { OwnField } from "../../src/screening/clearing/own-field";
import { TABLED_LIMITS } from "../../src/screening/clearing/distance-limits";
import { worstDistance } from "../../src/screening/clearing/worst-distance";
import { preparePlan } from "../../src/screening/prepared-plan";
import { runSteps } from "../../src/screening/steps";

type CircuitInput = PlanDocumentInput["circuits"][number];
type Cable = Pick<CircuitInput, "arrangement" | "supply">;

const FAR_M = 50_000;

/** Distances (m) at which 10 nT, 94 nT, 1.26 µT and 2 µT are met: computed beforehand from the two- and three-wire formulas, to two or three figures. */
const TOLERANCES_T = [10e-9, 94e-9, 1.26e-6, 2e-6];
const dc = (currentA: number) => ({ kind: "dc" as const, currentA });
const ac3 = { kind: "ac3" as const, currentA: 400, frequencyHz: 50 };
const CASES: [string, Cable, number[]][] = [
  ["5 A net current", { arrangement: { kind: "single" }, supply: dc(5) }, [100, 10.6, 0.79, 0.5]],
  [
    "100 A DC pair, 20 mm apart",
    { arrangement: { kind: "pair", spacingM: 0.02 }, supply: dc(100) },
    [6.3, 2.1, 0.56, 0.45],
  ],
  [
    "400 A flat, 30 mm",
    { arrangement: { kind: "flat", spacingM: 0.03 }, supply: ac3 },
    [20.4, 6.6, 1.82, 1.44],
  ],
  [
    "400 A trefoil, 30 mm",
    { arrangement: { kind: "trefoil", spacingM: 0.03 }, supply: ac3 },
    [17.1, 5.6, 1.53, 1.21],
  ],
];

function planWith(cable: Cable, limits: PlanDocumentInput["sensors"][number]["limits"]) {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Distances"),
    circuits: [
      {
        id: "c1",
        name: "Cable",
        path: [
          [-FAR_M, 0, 0],
          [FAR_M, 0, 0],
        ],
        conductorRadiusM: 0.004,
        ...(cable.arrangement.kind === "single" ? {} : { strayCurrentA: 0 }),
        ...cable,
      },
    ],
    sensors: [{ id: "s1", name: "Observer", position: [0, 0, 0], limits }],
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

describe("the distance at which a tolerance is met", () => {
  it.each(CASES)("%s", (_, cable, expectedM) => {
    const kind = cable.supply?.kind === "dc" ? ("static" as const) : ("alternating" as const);
    const limits = TOLERANCES_T.map((limitT) =>
      kind === "static" ? { kind, limitT } : { kind, limitT, bandHz: [10, 1000] as [number, number] },
    );
    const tabled = limits.map((limit) => ({
      shown: { id: "", label: "", kind, limit: limit.limitT, unit: "T" as const },
      limit,
      isHorizontal: false,
    }));
    const field = new OwnField(preparePlan(planWith(cable, limits)), tabled);
    expectedM.forEach((expected, i) => {
      const found = worstDistance((angleRad, radiusM) => field.shareAt(i, angleRad, radiusM), {
        fromM: field.insideM,
        reachM: 1000,
      });
      // Half a unit of the last figure given.
      const digits = expected >= 20 || expected < 2 ? 0.005 : 0.025;
      expect(Math.abs((found ?? 0) / expected - 1)).toBeLessThan(digits + 0.004);
    });
  });

  it("states compass-safe distances rounded up to 5 cm", () => {
    const [, pair] = CASES[1] as (typeof CASES)[number];
    const table = runSteps(complianceDistances(planWith(pair, [{ kind: "static", limitT: 1e-6 }])), {});
    const entry = (id: string) => table.circuits[0]?.entries.find(({ limitId }) => limitId === id);
    // B = µ₀ I d / 2π r² with B = 5.4° and 18° in radians, as µT.
    const closed = (fieldT: number) => Math.sqrt((MU_0 * 100 * 0.02) / (2 * Math.PI * fieldT));
    const strict = closed(((5.4 * Math.PI) / 180) * 1e-6);
    const steering = closed(((18 * Math.PI) / 180) * 1e-6);
    expect(entry("compass-5.4")?.distanceM).toBeCloseTo(strict, 3);
    expect(entry("compass-18")?.distanceM).toBeCloseTo(steering, 3);
    expect(strict).toBeGreaterThan(2.05);
    expect(entry("compass-5.4")?.statedM).toBe(2.1);
    expect(entry("compass-18")?.statedM).toBe(1.15);
    expect(table.limits.map(({ id }) => id)).toEqual(TABLED_LIMITS.map(({ shown }) => shown.id));
  });
});
