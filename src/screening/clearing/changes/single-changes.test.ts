import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { patched, type SingleChange } from "~/domain/clearing";
import type { PlanDocument, PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { clearingPlan, clearingPlans } from "../../../../tests/fixtures/clearing-plans";
import { preparePlan } from "../../prepared-plan";
import { screen } from "../../screen";
import { runSteps } from "../../steps";
import { clearing } from "../clearing";
import { standingOf } from "../standing";
import { OrderCost } from "./order-cost";
import { exhaustiveChoice, descendedChoice } from "./order-search";
import { ORDERS, ordersOf, reordered } from "./orders";

const changesOf = (document: PlanDocument, sensorIds: string[] | null = null) =>
  clearing(document, { sensorIds, parts: ["changes"] }).changes;

function expectScreened(document: PlanDocument, change: SingleChange): void {
  const changed = patched(document, change.patch);
  const after = screen(changed);
  const before = screen(document);
  let gained = 0;
  for (const entry of change.sensors) {
    const at = (result: typeof after) => {
      const found = result.sensors.find(({ id }) => id === entry.id);
      if (!found) throw new Error(entry.id);
      return found;
    };
    expect(entry.before).toEqual(standingOf(at(before)));
    expect(entry.after).toEqual(standingOf(at(after)));
    at(before).findings.forEach((finding, i) => {
      const next = at(after).findings[i];
      if (finding.verdict === "within" || !next) return;
      const reach = ({ value, expandedUncertainty, limit }: typeof finding) =>
        (value + expandedUncertainty) / limit;
      gained += reach(finding) - reach(next);
    });
  }
  expect(change.gained).toBeCloseTo(gained, 9);
  expect(parsePlanDocument(changed).ok).toBe(true);
}

type CircuitInput = PlanDocumentInput["circuits"][number];

const circuit = (
  rest: Partial<CircuitInput> & Pick<CircuitInput, "arrangement" | "supply">,
): CircuitInput => ({
  id: "c0",
  name: "Feeder",
  path: [
    [-50, 4, 2],
    [50, 4, 2],
  ],
  conductorRadiusM: 0.004,
  strayCurrentA: 0,
  currentTolerancePercent: 0,
  ...rest,
});
const ac3 = (currentA: number) => ({ kind: "ac3" as const, currentA, frequencyHz: 50 });
const probe = (limitT: number, kind: "static" | "alternating", y = 5) => ({
  id: "s1",
  name: "Probe",
  position: [6, y, 2] as [number, number, number],
  limits: [kind === "static" ? { kind, limitT } : { kind, limitT, bandHz: [10, 1000] as [number, number] }],
});

describe("single changes", () => {
  it("carry the figures of a fresh screening of the changed document, most gained first", () => {
    let judged = 0;
    fc.assert(
      fc.property(clearingPlans, (document) => {
        const changes = changesOf(document);
        const gains = changes.map(({ gained }) => gained);
        expect(gains).toEqual([...gains].sort((a, b) => b - a));
        for (const change of changes) {
          expectScreened(document, change);
          judged += 1;
        }
      }),
      { numRuns: 60 },
    );
    expect(judged).toBeGreaterThan(20);
  }, 60_000);

  it("name every kind that applies, with the objects' names, and nothing that gains nothing", () => {
    const document = clearingPlan(
      [
        circuit({
          arrangement: { kind: "flat", spacingM: 0.1 },
          supply: ac3(200),
          currentTolerancePercent: 10,
        }),
        circuit({
          id: "c1",
          name: "String",
          arrangement: { kind: "pair", spacingM: 0.1 },
          supply: { kind: "dc", currentA: 100 },
          strayCurrentA: 2,
        }),
      ],
      [
        {
          ...probe(2e-8, "alternating"),
          limits: [...probe(1e-8, "alternating").limits, ...probe(1e-8, "static").limits],
        },
      ],
    );
    const changes = changesOf(document);
    const kinds = new Set(changes.map(({ kind }) => kind));
    expect([...kinds].sort()).toEqual(
      [
        "current-known",
        "lower",
        "raise",
        "sideways",
        "spacing",
        "stray-current",
        "trefoil",
        "twisting",
      ].sort(),
    );
    for (const { words, gained } of changes) {
      expect(words).toMatch(/“Feeder”|“String”/);
      expect(gained).toBeGreaterThan(0);
    }
    const mended = changes.find(({ kind }) => kind === "stray-current");
    expect(mended?.patch.circuits[0]).toMatchObject({ id: "c1", strayCurrentA: 0 });
  });

  it("gain 1.41 by trefoil in place of flat at the same spacing", () => {
    const flat = clearingPlan(
      [circuit({ arrangement: { kind: "flat", spacingM: 0.03 }, supply: ac3(400) })],
      [probe(1e-7, "alternating", 7)],
    );
    const [trefoil] = changesOf(flat).filter(({ kind }) => kind === "trefoil");
    const [entry] = trefoil?.sensors ?? [];
    expect((entry?.before.budgetUsed ?? 0) / (entry?.after.budgetUsed ?? 1)).toBeCloseTo(Math.SQRT2, 1);
  });

  it("move a route with all that lies in it", () => {
    const document = clearingPlan(
      [
        circuit({
          path: undefined,
          route: { id: "r", placeM: [0, 0] },
          arrangement: { kind: "pair", spacingM: 0.1 },
          supply: { kind: "dc", currentA: 100 },
        } as CircuitInput),
      ],
      [probe(1e-6, "static")],
      {
        routes: [
          {
            id: "r",
            name: "Tray",
            path: [
              [-50, 4, 2],
              [50, 4, 2],
            ],
          },
        ],
      },
    );
    const moves = changesOf(document).filter(({ kind }) => kind === "sideways");
    expect(moves.map(({ words }) => words)).toEqual([
      "Move “Tray” with all that lies in it sideways by 0.5\u00a0m, towards 180° true",
    ]);
    expect(moves[0]?.ids).toEqual(["r", "c0"]);
    expect(moves[0]?.patch.routes[0]?.path[0]).toEqual([-50, 3.5, 2]);
  });
});

describe("phase orders", () => {
  /** Four flat sets at 41 mm, 1600 A: RST four times 21.5 µT at 1 m, RST-TSR-RST-TSR 2.6 µT (computed, equal sharing). */
  const riser = circuit({
    name: "Riser",
    arrangement: { kind: "flat", spacingM: 0.041, parallel: { sets: 4, pitchM: 0.123 } },
    supply: ac3(1600),
    conductorRadiusM: 0.015,
    path: [
      [-500, 4, 2],
      [500, 4, 2],
    ],
  });

  it("of parallel sets are the best of all combinations", () => {
    const document = clearingPlan([riser], [{ ...probe(1e-6, "alternating"), position: [0, 4, 3] }]);
    const [best] = changesOf(document).filter(({ kind }) => kind === "phase-orders");
    if (!best) throw new Error("no phase orders");
    expect(best.sensors[0]?.before.budgetUsed).toBeCloseTo(21.5, 0);
    expect(best.sensors[0]?.after.budgetUsed).toBeLessThan(2.65);
    expectScreened(document, best);
  });

  it("cost what a screening of the document with them says, and descend to the exhaustive optimum", () => {
    const document = clearingPlan(
      [
        {
          ...riser,
          id: "c0",
          arrangement: { kind: "flat", spacingM: 0.041, parallel: { sets: 2, pitchM: 0.123 } },
        },
        circuit({
          id: "c1",
          name: "Other",
          arrangement: { kind: "trefoil", spacingM: 0.05 },
          supply: ac3(300),
          path: riser.path ?? null,
          source: "c0",
        }),
      ],
      [
        { ...probe(1e-6, "alternating", 5.3), positionToleranceM: 0 },
        { ...probe(4e-7, "alternating", 3.1), id: "s2" },
      ],
      {
        loadCases: [
          { id: "a", name: "A", factors: { c0: 0.4 } },
          { id: "b", name: "B", factors: { c1: 0.2 } },
        ],
      },
    );
    const places = document.circuits.flatMap((entry) =>
      ordersOf(entry).map((_, set) => ({ circuit: entry, set })),
    );
    const present = places.map(() => 0);
    const cost = new OrderCost(preparePlan(document), [0, 1], places, present);
    for (const choice of [
      [0, 0, 0],
      [0, 5, 2],
      [3, 1, 4],
    ]) {
      const circuits = document.circuits.map((entry) =>
        reordered(
          entry,
          places.flatMap((place, i) => (place.circuit === entry ? [ORDERS[choice[i] ?? 0] ?? "abc"] : [])),
        ),
      );
      const { sensors } = screen({ ...document, circuits });
      const sum = sensors.slice(0, 2).reduce((total, entry) => total + standingOf(entry).budgetUsed, 0);
      expect(cost.of(choice)).toBeCloseTo(sum, 6);
    }
    const of = (choice: readonly number[]) => cost.of(choice);
    const best = runSteps(exhaustiveChoice(3, 6, present, of), {});
    const found = runSteps(descendedChoice(3, 6, present, of), {});
    expect(found.cost).toBeCloseTo(best.cost, 9);
  });
});
