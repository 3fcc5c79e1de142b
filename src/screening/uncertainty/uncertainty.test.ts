import { describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import type { Finding } from "~/domain/screening-result";
import { MU_0 } from "~/domain/units";
import { screen } from "../screen";
import { randomStream } from "./random";

type CircuitInput = PlanDocumentInput["circuits"][number];
type SensorInput = PlanDocumentInput["sensors"][number];

function finding(circuits: Partial<CircuitInput>[], sensor: Partial<SensorInput> = {}): Finding {
  const parsed = parsePlanDocument({
    ...emptyPlanDocument("Uncertainty"),
    routes: [
      {
        id: "r1",
        name: "Tray",
        path: [
          [-5000, 0, 0],
          [5000, 0, 0],
        ],
      },
    ],
    circuits: circuits.map((circuit, index) => ({
      id: `c${index}`,
      name: `Circuit ${index}`,
      ...(circuit.route
        ? {}
        : {
            path: [
              [-5000, 0, 0],
              [5000, 0, 0],
            ] as [number, number, number][],
          }),
      arrangement: { kind: "single" },
      conductorRadiusM: 1e-4,
      supply: { kind: "dc", currentA: 10 },
      currentTolerancePercent: 0,
      ...(circuit.arrangement && circuit.arrangement.kind !== "single" ? { strayCurrentA: 0 } : {}),
      ...circuit,
    })),
    sensors: [
      { id: "s", name: "Probe", position: [0, 1, 0], limits: [{ kind: "static", limitT: 1 }], ...sensor },
    ],
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  const [found] = screen(parsed.document).sensors[0]?.findings ?? [];
  if (!found) throw new Error("no finding");
  return found;
}

const wire = (currentA: number, rM: number) => (MU_0 * currentA) / (2 * Math.PI * rM);
const twiceRectangular = 2 / Math.sqrt(3);
const uOf = (...args: Parameters<typeof finding>) => finding(...args).expandedUncertainty;

describe("first-order uncertainty", () => {
  it("takes a wire's place and a sensor's place by the slope of 1/r", () => {
    const expected = twiceRectangular * 0.05 * wire(10, 1);
    expect(uOf([{ positionToleranceM: 0.05 }]) / expected).toBeCloseTo(1, 6);
    expect(uOf([{}], { positionToleranceM: 0.05 }) / expected).toBeCloseTo(1, 6);
  });

  it("takes a pair's spacing in proportion to its field", () => {
    const pair: Partial<CircuitInput> = {
      arrangement: { kind: "pair", spacingM: 0.02 },
      spacingTolerancePercent: 10,
    };
    const found = finding([pair]);
    expect(found.expandedUncertainty / (twiceRectangular * 0.1 * found.value)).toBeCloseTo(1, 3);
  });

  it("adds the bound of an unstated stray current, by default one per cent, and none where it is stated", () => {
    const pair = { arrangement: { kind: "pair" as const, spacingM: 0.5 } };
    const unstated = uOf([{ ...pair, strayCurrentA: null }]);
    expect(unstated / (twiceRectangular * wire(0.1, 1))).toBeCloseTo(1, 6);
    expect(uOf([{ ...pair, strayCurrentA: 0 }])).toBe(0);
    expect(
      uOf([{ ...pair, strayCurrentA: 0.3, strayToleranceA: 0.2 }]) / (twiceRectangular * wire(0.2, 1)),
    ).toBeCloseTo(1, 6);
  });

  it("moves circuits of one route together", () => {
    const apart = [
      { positionToleranceM: 0.05 },
      { positionToleranceM: 0.05, supply: { kind: "dc" as const, currentA: -10 } },
    ];
    const inRoute = apart.map((circuit, i) => ({
      ...circuit,
      route: { id: "r1", placeM: [0, 0.3 * i] as [number, number] },
    }));
    const alone = finding(
      apart.map((circuit, i) => ({
        ...circuit,
        path: [
          [-5000, 0, 0.3 * i],
          [5000, 0, 0.3 * i],
        ] as [number, number, number][],
      })),
    );
    const together = finding(inRoute);
    expect(together.value).toBeCloseTo(alone.value, 12);
    expect(together.expandedUncertainty).toBeLessThan(0.5 * alone.expandedUncertainty);
  });

  it("adds the background's own uncertainty", () => {
    const background = { staticT: 1e-6, expandedUncertaintyT: 2e-7, alternating: [], note: "" };
    const found = finding([{}], { background });
    expect(found.value).toBeCloseTo(wire(10, 1) + 1e-6, 11);
    expect(found.expandedUncertainty).toBeCloseTo(2e-7, 12);
    expect(found.contributions.reduce((sum, { part }) => sum + part, 0)).toBeCloseTo(1, 12);
  });
});

describe("Monte Carlo uncertainty", () => {
  it("takes over where the place is uncertain by more than a fifth of the distance", () => {
    const found = finding([{ positionToleranceM: 0.3 }]);
    expect(found.uncertaintyMethod).toBe("monte-carlo");
    // r = √((1 − v)² + u²) with both rectangular ±0.3: the 97.5 % point of 1/r lies near v = 0.285, u small.
    const reach = (found.value + found.expandedUncertainty) / wire(10, 1);
    expect(reach).toBeGreaterThan(1.3);
    expect(reach).toBeLessThan(1.43);
    expect(finding([{ positionToleranceM: 0.15 }]).uncertaintyMethod).toBe("first-order");
  });

  it("agrees with the first order where that holds, seen through a limit that needs it", () => {
    // Two opposed wires whose currents are uncertain: the field cancels and only its spread is left.
    const opposed = [
      { currentTolerancePercent: 10 },
      { currentTolerancePercent: 10, supply: { kind: "dc" as const, currentA: -10 } },
    ];
    const found = finding(opposed);
    expect(found.uncertaintyMethod).toBe("monte-carlo");
    // |x₁ − x₂| of two rectangular ±1: triangular, 97.5 % point 2(1 − √0.025).
    expect(found.expandedUncertainty / (2 * (1 - Math.sqrt(0.025)) * 0.1 * wire(10, 1))).toBeCloseTo(1, 1.5);
    expect(finding(opposed).expandedUncertainty).toBe(found.expandedUncertainty);
  });
});

describe("many small inputs", () => {
  it("are drawn together to what they give one by one", () => {
    // Currents that cancel around the sensor, so that only their spread is left; each holds a fiftieth of a per cent of a dimension.
    const around = (count: number): Partial<CircuitInput>[] =>
      Array.from({ length: count }, (_, i) => {
        const angle = (2 * Math.PI * i) / count;
        const [y, z] = [1 + 2 * Math.cos(angle), 2 * Math.sin(angle)];
        return {
          path: [
            [-5000, y, z],
            [5000, y, z],
          ],
          currentTolerancePercent: 20,
        };
      });
    const many = finding(around(240));
    const few = finding(around(60));
    expect(many.uncertaintyMethod).toBe("monte-carlo");
    // Two dimensions of equal spread: the 97.5 % point of a Rayleigh distribution, σ√(−2 ln 0.025).
    const sigma = (count: number) => (0.2 / Math.sqrt(3)) * wire(10, 2) * Math.sqrt(count / 2);
    const reach = Math.sqrt(-2 * Math.log(0.025));
    expect(many.expandedUncertainty / (reach * sigma(240))).toBeCloseTo(1, 1.3);
    expect(few.expandedUncertainty / (reach * sigma(60))).toBeCloseTo(1, 1.3);
  });
});

describe("randomStream", () => {
  it("has nought for its mean and one for its variance, and differs by seed and stream", () => {
    const sample = (seed: string, stream: number) => {
      const random = randomStream(seed, stream);
      return Array.from({ length: 20000 }, () => [random.rectangular(), random.normal()] as const);
    };
    const draws = sample("00112233445566778899aabb", 0);
    for (const which of [0, 1] as const) {
      const mean = draws.reduce((sum, draw) => sum + draw[which], 0) / draws.length;
      const variance = draws.reduce((sum, draw) => sum + draw[which] ** 2, 0) / draws.length;
      expect(Math.abs(mean)).toBeLessThan(0.03);
      expect(Math.abs(variance - 1)).toBeLessThan(0.05);
    }
    expect(sample("00112233445566778899aabb", 1)[0]).not.toEqual(draws[0]);
    expect(sample("10112233445566778899aabb", 0)[0]).not.toEqual(draws[0]);
  });
});
