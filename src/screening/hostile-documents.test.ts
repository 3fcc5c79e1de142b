import fc from "fast-check";
import { expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import type { PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { resultText } from "~/domain/result-text";
import { screeningResultSchema } from "~/domain/screening-result";
import { RefusedDocumentError } from "./refusal";
import { screen } from "./screen";

const line: [number, number, number][] = [
  [0, 0, 2.8],
  [6, 0, 2.8],
  [6, 4, 2.8],
];
const common = { name: "Circuit", conductorRadiusM: 0.006 };

/** One of everything that a document may hold. */
const whole: PlanDocumentInput = {
  format: "stillneedle-plan",
  version: 1,
  name: "Everything",
  frame: { northBearingDeg: 12.5 },
  earthField: { mode: "stated", horizontalT: 1.8e-5, verticalT: 4.6e-5, declinationDeg: 3.1 },
  unknownPhase: "typical",
  routes: [{ id: "r1", name: "Tray A", path: line }],
  circuits: [
    {
      ...common,
      id: "dc",
      path: line,
      arrangement: { kind: "pair", spacingM: 0.03 },
      supply: { kind: "dc", currentA: 120 },
      strayCurrentA: 1,
      loadGroup: "g",
      positionToleranceM: 0.05,
      spacingTolerancePercent: 5,
    },
    {
      ...common,
      id: "ac3",
      route: { id: "r1", placeM: [0.2, 0.1] },
      arrangement: {
        kind: "quad",
        spacingM: 0.05,
        rollDeg: 10,
        parallel: { sets: 2, pitchM: 0.2, phaseOrders: ["abc", "cba"] },
      },
      supply: {
        kind: "ac3",
        currentA: 40,
        frequencyHz: 50,
        harmonics: [{ order: 3, percent: 15, angleDeg: 5 }],
      },
      shieldingFactor: 0.8,
    },
    {
      ...common,
      id: "tw",
      path: line,
      arrangement: { kind: "twisted-pair", spacingM: 0.02, layM: 0.5 },
      supply: { kind: "ac1", currentA: 3, frequencyHz: 400 },
    },
    {
      ...common,
      id: "own",
      path: [
        [1, 5, 0],
        [1, 5, 3],
      ],
      arrangement: {
        kind: "custom",
        conductors: [
          { offsetM: [0, 0], of: "go", fraction: 1 },
          { offsetM: [0.05, 0], of: "return", fraction: 1 },
        ],
      },
      supply: { kind: "dc", currentA: -7 },
    },
    { ...common, id: "open", path: null, arrangement: { kind: "single" }, supply: null },
  ],
  equipment: [
    {
      id: "coil",
      name: "Reel",
      kind: "coil",
      turns: 3,
      radiusM: 0.4,
      lengthM: 0.1,
      centre: [5, 2, 0.5],
      axis: [0, 0, 1],
      supply: { kind: "dc", currentA: 20 },
    },
    {
      id: "toroid",
      name: "Choke",
      kind: "toroid",
      turns: 20,
      meanRadiusM: 0.08,
      minorRadiusM: 0.02,
      compensated: false,
      centre: [1, 2, 1],
      axis: [0, 1, 0],
      supply: { kind: "ac1", currentA: 10, frequencyHz: 50 },
    },
    {
      id: "dipole",
      name: "Lift",
      kind: "dipole",
      centre: [9, 3, 1],
      reading: { distanceM: 1.5, fieldT: 8e-6 },
      frequencyHz: 0,
      direction: null,
    },
  ],
  loadCases: [
    { id: "night", name: "Night", factors: { dc: 0.1, coil: 0 } },
    { id: "peak", name: "Peak", factors: {} },
  ],
  sensors: [
    {
      id: "s1",
      name: "Compass",
      position: [4, 3, 1.1],
      positionToleranceM: 0.02,
      background: { staticT: [1e-8, 0, 0], alternating: [{ frequencyHz: 50, rmsT: 2e-8 }] },
      limits: [
        { kind: "static", limitT: 1e-6 },
        { kind: "heading", limitDeg: 1 },
        { kind: "swing", limitT: 1e-6 },
      ],
    },
    {
      id: "s2",
      name: "Probe",
      position: [2, 1, 1],
      axis: [0, 0, 1],
      limits: [
        { kind: "alternating", limitT: 5e-7, bandHz: [10, 1000], measure: "peakToPeak" },
        { kind: "gradient", limitTPerM: 1e-7 },
        { kind: "range", limitT: 1e-4 },
      ],
    },
  ],
  drawing: {
    gridM: 0.5,
    loops: [
      {
        id: "l1",
        name: "Loop",
        polygon: [
          [0, 0, 0],
          [1, 0, 0],
          [0, 1, 0],
        ],
      },
    ],
  },
};

type Json = Record<string | number, unknown>;
interface Edit {
  pick: number;
  what: number;
  value: unknown;
  other: number;
}

const hostile = fc.oneof(
  fc.constantFrom<unknown>(
    null,
    true,
    "",
    "NaN",
    "Infinity",
    "1e3",
    NaN,
    Infinity,
    -Infinity,
    -0,
    0,
    -1,
    1e-320,
    5e-324,
    1e-7,
    1e308,
    -1e308,
    1e6,
    1e5,
    2 ** 53,
    [],
    {},
    [[]],
    [null],
    "dc",
    "s1",
    "r1",
    "x".repeat(500),
  ),
  fc.double(),
  fc.double({ min: -1e6, max: 1e6, noNaN: true }),
  fc.integer({ min: -10, max: 10 }),
  fc.jsonValue({ maxDepth: 3 }) as fc.Arbitrary<unknown>,
);
const FACTORS = [0, -1, 0.5, 2, 1e-3, 1e3, 1e-12, 1e-300, 1e300];
const strangeKeys = [
  "__proto__",
  "constructor",
  "toString",
  "length",
  "colour",
  "id",
  "path",
  "supply",
  "source",
];

/** Every place in a document, with the object or list that holds it. */
function places(value: unknown, found: [Json, string | number][] = []): [Json, string | number][] {
  if (typeof value !== "object" || value === null) return found;
  for (const key of Object.keys(value)) {
    found.push([value as Json, Array.isArray(value) ? Number(key) : key]);
    places((value as Json)[key], found);
  }
  return found;
}

function edited(document: Json, { pick, what, value, other }: Edit): void {
  const everywhere = places(document);
  // Half of the edits only change a number, so that many documents are still taken.
  const gentle = what % 2 === 0;
  const all = gentle ? everywhere.filter(([holder, key]) => typeof holder[key] === "number") : everywhere;
  const place = all[pick % all.length];
  const source = all[other % all.length];
  if (!place || !source) return;
  const [holder, key] = place;
  if (gentle) {
    holder[key] = Number(holder[key]) * (FACTORS[other % FACTORS.length] ?? 1);
    return;
  }
  const copy = (part: unknown): unknown => structuredClone(part);
  switch ((what >> 1) % 5) {
    case 0:
    case 1:
      holder[key] = value;
      return;
    case 2:
      if (Array.isArray(holder)) holder.splice(Number(key), 1);
      else Reflect.deleteProperty(holder, key);
      return;
    case 3:
      // Ids, points and whole entries in the places of others.
      holder[key] = copy(source[0][source[1]]);
      return;
    case 4:
      if (Array.isArray(holder)) holder.push(copy(holder[Number(key)]));
      else
        Object.defineProperty(holder, strangeKeys[other % strangeKeys.length] ?? "", {
          value,
          enumerable: true,
          configurable: true,
          writable: true,
        });
      return;
  }
}

const edits = fc.array(fc.record({ pick: fc.nat(), what: fc.nat(), value: hostile, other: fc.nat() }), {
  minLength: 1,
  maxLength: 3,
});

it(
  "judges whatever a document is turned into without throwing, and screens or refuses what it takes",
  { timeout: 120_000 },
  () => {
    let taken = 0;
    fc.assert(
      fc.property(edits, (list) => {
        const document = structuredClone(whole) as unknown as Json;
        for (const edit of list) edited(document, edit);
        const parsed = parsePlanDocument(document);
        if (!parsed.ok) {
          expect(parsed.faults.length).toBeGreaterThan(0);
          for (const { path, message } of parsed.faults)
            expect([path !== "", message !== ""]).toEqual([true, true]);
          return;
        }
        taken += 1;
        try {
          screeningResultSchema.parse(JSON.parse(resultText(screen(parsed.document))));
        } catch (error) {
          if (!(error instanceof RefusedDocumentError)) throw error;
          for (const { path, message } of error.faults)
            expect([path !== "", message !== ""]).toEqual([true, true]);
        }
      }),
      { numRuns: 500 },
    );
    expect(taken).toBeGreaterThan(40);
  },
);

it("takes the document as it is", () => {
  expect(parsePlanDocument(whole)).toMatchObject({ ok: true });
});

it("is not thrown by what is no document at all", () => {
  fc.assert(
    fc.property(fc.anything({ withNullPrototype: true }), (value) => parsePlanDocument(value).ok === false),
    { numRuns: 500 },
  );
});
