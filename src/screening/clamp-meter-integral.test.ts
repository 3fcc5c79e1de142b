import fc from "fast-check";
import { expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { resolveDefaults } from "~/domain/plan-document/resolved";
import { MU_0 } from "~/domain/units";
import { gaussLegendre } from "~/field/circulation";
import { along, dot, subtract, type Vector } from "~/field/vector";
import { clampMeterReading } from "./clamp-meter";
import { compilePlan, type CompiledPlan } from "./compile";
import { componentPhasors, influenceAt } from "./influence";
import { RefusedDocumentError } from "./refusal";

function planOf(json: object): PlanDocument {
  const parsed = parsePlanDocument({ ...emptyPlanDocument("Loops"), ...json });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  return parsed.document;
}

const document = planOf({
  circuits: [
    {
      id: "out",
      name: "String",
      path: [
        [-3, 0, 0],
        [3, 0.2, 0.1],
        [3, 3, 1],
      ],
      arrangement: { kind: "single" },
      conductorRadiusM: 0.005,
      supply: { kind: "dc", currentA: 50 },
    },
    {
      id: "pair",
      name: "Feed",
      path: [
        [0, -3, 0.3],
        [0, 3, 0.2],
      ],
      arrangement: { kind: "pair", spacingM: 0.3 },
      conductorRadiusM: 0.01,
      supply: { kind: "ac1", currentA: 20, frequencyHz: 50, phaseDeg: 30 },
      strayCurrentA: 2,
    },
  ],
  equipment: [
    {
      id: "reel",
      name: "Reel",
      kind: "coil",
      turns: 3,
      radiusM: 0.6,
      lengthM: 0.4,
      centre: [0.2, 0.1, -0.4],
      axis: [1, 2, 3],
      supply: { kind: "dc", currentA: 11 },
    },
    {
      id: "lift",
      name: "Lift",
      kind: "dipole",
      centre: [0, 0, 5],
      direction: [0, 1, 0],
      reading: { distanceM: 1, fieldT: 1e-5 },
      frequencyHz: 0,
    },
  ],
});
const plan = compilePlan(resolveDefaults(document));
const RULE = gaussLegendre(12);

/** B of every group at a point, six numbers a group. */
function fieldAt(compiled: CompiledPlan, [x, y, z]: Vector): Float64Array {
  const influence = new Float64Array(3 * compiled.setCount);
  const phasors = new Float64Array(6 * compiled.components.length);
  influenceAt(compiled, x, y, z, influence);
  componentPhasors(compiled, influence, 3, "currents", phasors);
  const groups = new Float64Array(6 * compiled.frequencies.groups.length);
  compiled.components.forEach(({ group }, index) => {
    for (let i = 0; i < 6; i++)
      groups[6 * group + i] = (groups[6 * group + i] ?? 0) + (phasors[6 * index + i] ?? 0);
  });
  return groups;
}

/** B along a side, integrated over it: real and imaginary part of every group, A. */
function alongSide(from: Vector, to: Vector): number[] {
  const side = subtract(to, from);
  const sums = plan.frequencies.groups.flatMap(() => [0, 0]);
  RULE.nodes.forEach((node, i) => {
    const field = fieldAt(plan, along(from, side, (node + 1) / 2));
    sums.forEach((sum, k) => {
      const part: Vector = [field[3 * k] ?? 0, field[3 * k + 1] ?? 0, field[3 * k + 2] ?? 0];
      sums[k] = sum + ((RULE.weights[i] ?? 0) * dot(part, side)) / 2 / MU_0;
    });
  });
  return sums;
}

/** Halves a side until its halves say the same as the whole. */
function adaptive(from: Vector, to: Vector, whole = alongSide(from, to), depth = 0): number[] {
  const middle = along(from, subtract(to, from), 0.5);
  const [first, second] = [alongSide(from, middle), alongSide(middle, to)];
  const both = first.map((value, k) => value + (second[k] ?? 0));
  const isClose = both.every((value, k) => Math.abs(value - (whole[k] ?? 0)) < 1e-7);
  if (isClose || depth > 22) return both;
  const [left, right] = [adaptive(from, middle, first, depth + 1), adaptive(middle, to, second, depth + 1)];
  return left.map((value, k) => value + (right[k] ?? 0));
}

// In odd centimetres, which keeps sides from touching the axes of what is drawn exactly.
const coordinate = fc.integer({ min: -75, max: 75 }).map((step) => (2 * step + 1) / 100);
const corner = fc.tuple(coordinate, coordinate, coordinate);

it("counts what the line integral of the field around the loop says", { timeout: 60_000 }, () => {
  let threaded = 0;
  fc.assert(
    fc.property(fc.array(corner, { minLength: 3, maxLength: 6 }), (loop) => {
      let reading;
      try {
        reading = clampMeterReading(document, loop);
      } catch (error) {
        // A loop through a conductor, which random corners may well make.
        if (error instanceof RefusedDocumentError) return;
        throw error;
      }
      const sums = loop
        .map((from, index) => adaptive(from, loop[(index + 1) % loop.length] ?? from))
        .reduce((total, side) => total.map((value, k) => value + (side[k] ?? 0)));
      if (Math.abs(reading.dcA) > 5) threaded += 1;
      expect(reading.dcA).toBeCloseTo(sums[0] ?? NaN, 4);
      expect(reading.alternating).toHaveLength(1);
      expect(reading.alternating[0]?.rmsA).toBeCloseTo(Math.hypot(sums[2] ?? NaN, sums[3] ?? NaN), 4);
    }),
    { numRuns: 60 },
  );
  expect(threaded).toBeGreaterThan(5);
});

it.each<[string, Vector[], RegExp]>([
  [
    "a conductor",
    [
      [-1, -1, 0.0667],
      [-1, 1, 0.0667],
      [-1, 1, 2],
    ],
    /^loop\[0\]: .*a conductor of "String" \(out\) at \(-1, 0\.067, 0\.067\)/,
  ],
  [
    "a winding",
    [
      [0.2, 0.1, -0.4],
      [0.2 + 0.6 * Math.SQRT1_2, 0.1 + 0, -0.4 - 0.6 * Math.SQRT1_2],
      [3, 3, -3],
    ],
    /winding of "Reel"/,
  ],
])("refuses a loop through %s, with the place", (what, loop, message) => {
  const straight = planOf({
    circuits: [
      {
        ...document.circuits[0],
        path: [
          [-3, 0.0667, 0.0667],
          [3, 0.0667, 0.0667],
        ],
        route: null,
      },
    ],
    equipment: [{ ...document.equipment[0], turns: 1, lengthM: 0, axis: [1, 0, 1] }],
  });
  expect(what).not.toBe("");
  expect(() => clampMeterReading(straight, loop)).toThrow(message);
});
