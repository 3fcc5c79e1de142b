import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import type { ScreeningResult } from "~/domain/screening-result";
import { MU_0 } from "~/domain/units";
import { screen } from "./screen";

type EquipmentInput = NonNullable<PlanDocumentInput["equipment"]>[number];
type LimitInput = PlanDocumentInput["sensors"][number]["limits"][number];

function screened(
  equipment: EquipmentInput[],
  position: [number, number, number],
  limits: LimitInput[],
  rest: Partial<PlanDocumentInput> = {},
): ScreeningResult {
  const sensors = [{ id: "s", name: "Probe", position, limits }];
  const parsed = parsePlanDocument({ ...emptyPlanDocument("Equipment"), equipment, sensors, ...rest });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return screen(parsed.document);
}

const valueOf = (...args: Parameters<typeof screened>): number =>
  screened(...args).sensors[0]?.findings[0]?.value ?? NaN;

const STATIC: LimitInput = { kind: "static", limitT: 1 };
const dipole = (rest: Partial<Extract<EquipmentInput, { kind: "dipole" }>> = {}): EquipmentInput => ({
  id: "t2",
  name: "Magnet",
  kind: "dipole",
  centre: [0, 0, 0],
  reading: { distanceM: 1.5, fieldT: 8e-6 },
  frequencyHz: 0,
  direction: null,
  ...rest,
});

describe("equipment", () => {
  it("gives a coil's field and names a sensor inside of it", () => {
    const reel: EquipmentInput = {
      id: "e1",
      name: "Spare reel",
      kind: "coil",
      turns: 12,
      radiusM: 0.4,
      lengthM: 0,
      centre: [5, 2, 0.5],
      axis: [0, 0, 2],
      supply: { kind: "dc", currentA: 20 },
    };
    expect(valueOf([reel], [5, 2, 1.5], [STATIC])).toBeCloseTo(
      (12 * MU_0 * 20 * 0.16) / (2 * (0.16 + 1) ** 1.5),
      13,
    );
    const inside = screened([{ ...reel, lengthM: 0.4 }], [5, 2, 0.5], [STATIC]);
    expect(inside.checks.warnings.join()).toMatch(/Spare reel.*inside the coil/);
  });

  it("gives a toroid one turn outside, none when compensated, and does not judge its winding", () => {
    const choke: EquipmentInput = {
      id: "e2",
      name: "Choke",
      kind: "toroid",
      turns: 200,
      meanRadiusM: 0.08,
      minorRadiusM: 0.02,
      compensated: false,
      centre: [0, 0, 0],
      axis: [0, 0, 1],
      supply: { kind: "ac1", currentA: 10, frequencyHz: 50 },
    };
    const limits: LimitInput[] = [{ kind: "alternating", limitT: 1, bandHz: [10, 100] }];
    const one = (MU_0 * 10 * 0.0064) / (2 * (0.0064 + 0.25) ** 1.5);
    expect(valueOf([choke], [0, 0, 0.5], limits)).toBeCloseTo(one, 14);
    expect(valueOf([{ ...choke, compensated: true }], [0, 0, 0.5], limits)).toBe(0);
    expect(screened([choke], [0.085, 0, 0], limits).verdict).toBe("undecided");
  });

  it("takes a dipole's stated direction as a vector field and an unknown one as a bound", () => {
    const known = dipole({ direction: [0, 0, 1] });
    expect(valueOf([known], [0, 0, 3], [STATIC])).toBeCloseTo(1e-6, 15);
    expect(valueOf([known], [3, 0, 0], [STATIC])).toBeCloseTo(5e-7, 15);
    expect(valueOf([dipole()], [3, 0, 0], [STATIC])).toBeCloseTo(1e-6, 15);
    expect(valueOf([dipole()], [0, 0, 3], [{ kind: "gradient", limitTPerM: 1 }])).toBeCloseTo(
      ((Math.sqrt(54) / 2) * 1e-6) / 3,
      14,
    );
    expect(valueOf([known], [0, 0, 3], [{ kind: "gradient", limitTPerM: 1 }])).toBeCloseTo(
      ((Math.sqrt(54) / 2) * 1e-6) / 3,
      14,
    );
  });

  it("caps the verdict nearer than the reading was taken", () => {
    const near = screened([dipole()], [1, 0, 0], [STATIC]);
    expect(near.verdict).toBe("undecided");
    expect(near.checks.warnings.join()).toMatch(/nearer than the 1.5 m/);
  });

  it("adds asin(b/R₀) to a heading, and 180° where the bound reaches the disturbed field", () => {
    const earthField = { mode: "stated" as const, horizontalT: 2e-5, verticalT: 4e-5, declinationDeg: 0 };
    const limits: LimitInput[] = [{ kind: "heading", limitDeg: 5 }];
    const at = (r: number) => valueOf([dipole()], [r, 0, 0], limits, { earthField });
    expect(at(3)).toBeCloseTo((Math.asin(0.05) * 180) / Math.PI, 10);
    expect(at(1)).toBe(180);
  });

  it("swings a magnet of unknown direction by the change of its factor", () => {
    const loadCases = [
      { id: "a", name: "A", factors: { t2: 1 } },
      { id: "b", name: "B", factors: { t2: -1 } },
    ];
    const limits: LimitInput[] = [{ kind: "swing", limitT: 1 }];
    expect(valueOf([dipole()], [3, 0, 0], limits, { loadCases })).toBeCloseTo(2e-6, 15);
    expect(valueOf([dipole()], [3, 0, 0], limits)).toBeCloseTo(1e-6, 15);
  });

  it("lists the bound's own part and sums contributions to 1", () => {
    const circuits: PlanDocumentInput["circuits"] = [
      {
        id: "c1",
        name: "Return",
        path: [
          [-50, 1, 0],
          [50, 1, 0],
        ],
        arrangement: { kind: "single" },
        conductorRadiusM: 0.001,
        supply: { kind: "dc", currentA: 5 },
      },
    ];
    const [finding] = screened([dipole()], [3, 0, 0], [STATIC], { circuits }).sensors[0]?.findings ?? [];
    const parts = Object.fromEntries((finding?.contributions ?? []).map(({ id, part }) => [id, part]));
    expect(parts["t2"]).toBeCloseTo(1e-6 / (finding?.value ?? 1), 12);
    expect((parts["t2"] ?? 0) + (parts["c1"] ?? 0)).toBeCloseTo(1, 12);
  });
});
