import { describe, expect, it } from "vitest";
import { MAX_FAULTS } from "./faults";
import { parsePlanDocument } from "./parse";
import { emptyPlanDocument } from "./plan-document";
import { readPlanDocument } from "./read";

const circuit = (id: number, more: object = {}) => ({
  id: `c${id}`,
  name: "String",
  path: [
    [0, id, 0],
    [9, id, 0],
  ],
  arrangement: { kind: "single" },
  conductorRadiusM: 0.006,
  supply: { kind: "dc", currentA: 1 },
  ...more,
});
const sensor = (id: number, more: object = {}) => ({
  id: `s${id}`,
  name: "Probe",
  position: [id, 1, 0],
  limits: [{ kind: "static", limitT: 1e-6 }],
  ...more,
});
const many = <T>(count: number, of: (index: number) => T): T[] =>
  Array.from({ length: count }, (_, i) => of(i));
const zigzag = (points: number) => many(points, (i) => [i, i % 2, 0]);

function faultsOf(json: object): string[] {
  const parsed = parsePlanDocument({ ...emptyPlanDocument("Bounds"), ...json });
  return parsed.ok ? [] : parsed.faults.map(({ path, message }) => `${path}: ${message}`);
}

describe("a document that is too much", () => {
  it.each<[string, object, string | RegExp]>([
    ["circuits", { circuits: many(5001, circuit) }, "circuits: at most 5000 circuits"],
    ["very many circuits", { circuits: many(30_000, circuit) }, /^circuits: 30000 .*at most 5000 circuits/],
    ["sensors", { sensors: many(5001, sensor) }, "sensors: at most 5000 sensors"],
    [
      "load cases",
      { loadCases: many(101, (i) => ({ id: `l${i}`, name: "Case" })) },
      "loadCases: at most 100 load cases",
    ],
    [
      "segments of one path",
      { circuits: many(11, (i) => circuit(i, { path: zigzag(20_000) })) },
      /^circuits: 220011 straight conductor segments/,
    ],
    [
      "segments of one route that many circuits run in",
      {
        routes: [{ id: "r", name: "Tray", path: zigzag(19_999) }],
        circuits: many(11, (i) => ({ ...circuit(i, { route: { id: "r" } }), path: undefined })),
      },
      /^circuits: 220000 straight conductor segments/,
    ],
    [
      "segments of parallel sets",
      {
        circuits: many(600, (i) =>
          circuit(i, {
            arrangement: { kind: "pair", spacingM: 0.03, parallel: { sets: 100, pitchM: 0.1 } },
          }),
        ),
      },
      /^circuits: 360000 straight conductor segments/,
    ],
    [
      "chords of twisted pairs",
      {
        circuits: many(200, (i) =>
          circuit(i, { arrangement: { kind: "twisted-pair", spacingM: 0.03, layM: 0.1 } }),
        ),
      },
      /^circuits: 385200 straight conductor segments/,
    ],
    [
      "turns of coils",
      {
        equipment: many(21, (i) => ({
          id: `e${i}`,
          name: "Reel",
          kind: "coil",
          turns: 10_000,
          radiusM: 1,
          lengthM: 1,
          centre: [0, 0, 0],
          axis: [0, 0, 1],
          supply: { kind: "dc", currentA: 1 },
        })),
      },
      /^circuits: 210000 straight conductor segments and coils' turns/,
    ],
    [
      "harmonics",
      {
        circuits: many(101, (i) =>
          circuit(i, {
            supply: {
              kind: "ac1",
              currentA: 1,
              frequencyHz: 50,
              harmonics: many(200, (h) => ({ order: h + 2, percent: 1 })),
            },
          }),
        ),
      },
      /^circuits: 20200 harmonics/,
    ],
    [
      "lines in the result",
      { circuits: many(2000, circuit), sensors: many(1001, sensor) },
      /^sensors: 2002000 limits times sources/,
    ],
    [
      "nesting",
      { drawing: JSON.parse("[".repeat(5000) + "]".repeat(5000)) as object },
      /^drawing\[0\]\[0\].*: is nested deeper than 100/,
    ],
    [
      "values in one entry",
      { circuits: [circuit(0, { path: many(19_000, (i) => [i, 0, 0, 0, 0, 0]) })] },
      /^circuits\[0\]\.path\[\d+\]: holds more/,
    ],
    [
      "a list",
      { circuits: [circuit(0, { path: zigzag(20_001) })] },
      /^circuits\[0\]\.path: has 20001 entries/,
    ],
  ])("is refused for its %s", (_, json, fault) => {
    expect(faultsOf(json)).toEqual([fault instanceof RegExp ? expect.stringMatching(fault) : fault]);
  });

  it("is taken at the limit of circuits and of sensors", () => {
    expect(faultsOf({ circuits: many(5000, circuit) })).toEqual([]);
    expect(faultsOf({ sensors: many(5000, sensor) })).toEqual([]);
    expect(faultsOf({ circuits: many(10, (i) => circuit(i, { path: zigzag(19_999) })) })).toEqual([]);
  });
});

describe("a flood of faults", () => {
  const last = (count: number) => `document: and ${count - MAX_FAULTS} more faults; the first 200 are listed`;

  it("is cut, and says how many more there are", () => {
    const faults = faultsOf({ sensors: many(300, (i) => sensor(i, { axis: "up" })) });
    expect([faults.length, faults.at(-1)]).toEqual([MAX_FAULTS + 1, last(300)]);
  });

  it("is judged entry by entry in a large document, with the same paths", () => {
    const path = (points: number) => many(points, (i) => (i === 0 ? ["x", 0, 0] : [i, 0, 0]));
    const bad = many(4000, (i) => circuit(i, { path: path(15) }));
    const faults = faultsOf({ circuits: bad, colour: "red" });
    expect([faults.length, faults.at(-1)]).toEqual([MAX_FAULTS + 1, last(4001)]);
    expect(faults[0]).toMatch(/^circuits\[0\]\.path\[0\]\[0\]: /);
    const flood = faultsOf({
      circuits: many(4000, (i) => circuit(i, { path: many(15, () => ["x", 0, 0]) })),
    });
    expect([flood.length, flood.at(-1)]).toEqual([
      MAX_FAULTS + 1,
      expect.stringMatching(/^document: and at least 98\d\d more/),
    ]);
  });

  it("of 20 MB is told within seconds", { timeout: 30_000 }, () => {
    const text = `{"circuits":[[${"1,".repeat(9_000_000)}1]]}`;
    const startedAt = performance.now();
    expect(readPlanDocument(text)).toMatchObject({ ok: false, faults: [{ path: "circuits[0]" }] });
    const wide = `{"sensors":[${many(5000, () => `{"limits":[${"1,".repeat(1900)}1]}`).join(",")}]}`;
    expect(wide.length).toBeGreaterThan(19_000_000);
    expect(readPlanDocument(wide)).toMatchObject({ ok: false });
    expect(performance.now() - startedAt).toBeLessThan(25_000);
  });
});

it("says what is no JSON, and never throws for it", () => {
  for (const text of ["", "{", "[".repeat(1_000_000), "NaN", '{"a":1e}', "\u0000"])
    expect(readPlanDocument(text)).toMatchObject({ ok: false });
});

it("judges keys that reach for prototypes as unknown", () => {
  const keys = ["__proto__", "constructor", "prototype", "toString", "hasOwnProperty"];
  for (const key of keys) {
    const text = JSON.stringify(emptyPlanDocument("Keys")).replace(
      "{",
      `{${JSON.stringify(key)}:{"polluted":1},`,
    );
    const read = readPlanDocument(text);
    expect([key, read.ok ? [] : read.faults.map(({ path }) => path)]).toEqual([key, [key]]);
    const nested = {
      ...emptyPlanDocument("Keys"),
      loadCases: [{ id: "l", name: "Case", factors: JSON.parse(`{"${key}":1}`) as object }],
    };
    expect([key, parsePlanDocument(nested).ok]).toEqual([key, false]);
  }
  expect(({} as Record<string, unknown>)["polluted"]).toBeUndefined();
});

it("cuts words of the document that are too long for a message", () => {
  const [fault = ""] = faultsOf({ ["k".repeat(1_000_000)]: 1 });
  expect(fault.length).toBeLessThan(300);
});

it("takes its own output again, backgrounds without a static part too", () => {
  const first = parsePlanDocument({
    ...emptyPlanDocument("Again"),
    sensors: [sensor(0, { background: { alternating: [{ frequencyHz: 50, rmsT: 2e-8 }] } })],
  });
  if (!first.ok) throw new Error(JSON.stringify(first.faults));
  expect(parsePlanDocument(JSON.parse(JSON.stringify(first.document)))).toEqual(first);
});
