import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { comparePlans, type ObjectChange } from "./comparison";
import { emptyPlanDocument, planDocumentSchema } from "./plan-document/plan-document";

const coordinateM = fc.integer({ min: -50, max: 50 });
const point = fc.tuple(coordinateM, coordinateM, coordinateM);
const circuit = fc.record({
  id: fc.constantFrom("c1", "c2", "c3"),
  name: fc.constantFrom("Riser", "String A"),
  path: fc.option(fc.array(point, { minLength: 2, maxLength: 4 })),
  arrangement: fc.record({ kind: fc.constant("pair"), spacingM: fc.constantFrom(0.03, 0.05) }),
  conductorRadiusM: fc.constant(0.006),
  supply: fc.option(fc.record({ kind: fc.constant("dc"), currentA: fc.constantFrom(90, 120) })),
});
const sensor = fc.record({
  id: fc.constantFrom("s1", "s2", "s3"),
  name: fc.constantFrom("Dock", "Bench"),
  position: point,
  limits: fc.array(fc.record({ kind: fc.constant("static"), limitT: fc.constantFrom(1e-6, 2e-6) }), {
    minLength: 1,
    maxLength: 2,
  }),
});
const plan = fc
  .record({
    circuits: fc.uniqueArray(circuit, { selector: ({ id }) => id, maxLength: 3 }),
    sensors: fc.uniqueArray(sensor, { selector: ({ id }) => id, maxLength: 3 }),
  })
  .map((part) => planDocumentSchema.parse({ ...emptyPlanDocument("Level 1"), ...part }));

const opposite = { added: "removed", removed: "added", altered: "altered" } as const;
const exchanged = (changes: readonly ObjectChange[]): ObjectChange[] =>
  changes.map(({ change, nameBefore, nameAfter, fields, ...rest }) => ({
    ...rest,
    change: opposite[change],
    nameBefore: nameAfter,
    nameAfter: nameBefore,
    fields: fields.map(({ field, before, after }) => ({ field, before: after, after: before })),
  }));

describe("comparePlans", () => {
  it("finds nothing between a document and itself, whatever the order of its objects", () => {
    fc.assert(
      fc.property(plan, (document) => {
        const turned = { ...document, sensors: [...document.sensors].reverse() };
        expect(comparePlans(document, structuredClone(turned))).toEqual([]);
      }),
    );
  });

  it("is the same the other way round, with its sides exchanged", () => {
    fc.assert(
      fc.property(plan, plan, (a, b) => {
        expect(comparePlans(b, a)).toEqual(exchanged(comparePlans(a, b)));
      }),
    );
  });

  it("says in words with units what moved and what changed", () => {
    const document = (currentA: number, x: number) =>
      planDocumentSchema.parse({
        ...emptyPlanDocument("Level 1"),
        circuits: [
          {
            id: "c1",
            name: "Riser",
            path: null,
            arrangement: { kind: "pair", spacingM: 0.03 },
            conductorRadiusM: 0.006,
            supply: { kind: "dc", currentA },
          },
        ],
        sensors: [
          { id: "s1", name: "Dock", position: [x, 0, 1], limits: [{ kind: "static", limitT: 1e-6 }] },
        ],
      });
    const named = (name: string) => ({ nameBefore: name, nameAfter: name, change: "altered" });
    expect(comparePlans(document(120, 4), document(90, 5))).toEqual([
      {
        ...named("Riser"),
        kind: "circuit",
        id: "c1",
        moved: false,
        fields: [{ field: "supply, current", before: "120\u00a0A", after: "90\u00a0A" }],
      },
      { ...named("Dock"), kind: "sensor", id: "s1", moved: true, fields: [] },
    ]);
  });
});
