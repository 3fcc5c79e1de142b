import { describe, expect, it } from "vitest";
import * as z from "zod";
import { parsePlanDocument } from "./parse";
import { emptyPlanDocument, planDocumentSchema, type PlanDocumentInput } from "./plan-document";
import { resolveDefaults } from "./resolved";

const base = (): PlanDocumentInput => ({
  format: "stillneedle-plan",
  version: 1,
  name: "Test bay",
  frame: { northBearingDeg: 12.5 },
  circuits: [
    {
      id: "c1",
      name: "String A",
      path: [
        [0, 0, 2.8],
        [12, 0, 2.8],
      ],
      arrangement: { kind: "pair", spacingM: 0.03 },
      conductorRadiusM: 0.006,
      supply: { kind: "dc", currentA: 120 },
    },
  ],
  sensors: [{ id: "s1", name: "Compass", position: [4, 3, 1.1], limits: [{ kind: "static", limitT: 1e-6 }] }],
});

/** Faults of the base document after an edit that its type would not allow. */
function faultsAfter(edit: (document: ReturnType<typeof loose>) => void) {
  const document = loose();
  edit(document);
  const parsed = parsePlanDocument(document);
  return parsed.ok ? [] : parsed.faults.map(({ path, message }) => `${path}: ${message}`);
}

const loose = () =>
  JSON.parse(JSON.stringify(base())) as Record<string, unknown> & {
    circuits: Record<string, unknown>[];
    sensors: Record<string, unknown>[];
  };

const firstOf = (list: Record<string, unknown>[]) => {
  const [first] = list;
  if (!first) throw new Error("the list is empty");
  return first;
};

describe("parsePlanDocument", () => {
  it("fills in defaults and keeps rules open until they are resolved", () => {
    const parsed = parsePlanDocument(base());
    if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
    const [circuit] = parsed.document.circuits;
    expect(circuit).toMatchObject({
      source: null,
      currentBasis: "load-list",
      strayCurrentA: null,
      route: null,
    });
    expect(parsed.document.sensors[0]?.limits[0]?.id).toBe("1");
    expect(parsed.document).toMatchObject({ unknownPhase: "worst-case", loadCases: [], earthField: null });
    expect(resolveDefaults(parsed.document).circuits[0]).toMatchObject({
      source: "c1",
      currentTolerancePercent: 10,
      strayToleranceA: 1.2,
    });
    expect(parsePlanDocument(parsed.document)).toEqual(parsed);
  });

  it("accepts an empty document", () => {
    expect(parsePlanDocument(emptyPlanDocument("Blank"))).toEqual({
      ok: true,
      document: emptyPlanDocument("Blank"),
    });
  });

  it.each<[string, Parameters<typeof faultsAfter>[0], RegExp]>([
    ["unknown key", (d) => (d["colour"] = 1), /^colour: unknown key/],
    ["unknown nested key", (d) => (firstOf(d.circuits)["lenght"] = 1), /^circuits\[0\]\.lenght: unknown key/],
    [
      "infinity",
      (d) => (firstOf(d.circuits)["supply"] = { kind: "dc", currentA: Infinity }),
      /^circuits\[0\]\.supply\.currentA: /,
    ],
    [
      "too much current",
      (d) => (firstOf(d.circuits)["supply"] = { kind: "dc", currentA: 1.1e6 }),
      /^circuits\[0\]\.supply\.currentA: .*1 MA/,
    ],
    [
      "too far",
      (d) => (firstOf(d.sensors)["position"] = [0, 0, 100001]),
      /^sensors\[0\]\.position\[2\]: .*100 km/,
    ],
    [
      "limit of nought",
      (d) => (firstOf(d.sensors)["limits"] = [{ kind: "static", limitT: 0 }]),
      /^sensors\[0\]\.limits\[0\]\.limitT: /,
    ],
    ["no limit", (d) => (firstOf(d.sensors)["limits"] = []), /^sensors\[0\]\.limits: /],
    ["duplicate circuit", (d) => d.circuits.push(firstOf(d.circuits)), /^circuits\[1\]\.id: .*twice/],
    [
      "duplicate limit",
      (d) =>
        (firstOf(d.sensors)["limits"] = [
          { kind: "static", limitT: 1 },
          { id: "1", kind: "static", limitT: 1 },
        ]),
      /^sensors\[0\]\.limits\[1\]\.id: /,
    ],
    [
      "no such route",
      (d) => {
        firstOf(d.circuits)["path"] = null;
        firstOf(d.circuits)["route"] = { id: "r9" };
      },
      /^circuits\[0\]\.route\.id: there is no route/,
    ],
    [
      "no such circuit in a load case",
      (d) => (d["loadCases"] = [{ id: "n", name: "N", factors: { c9: 1 } }]),
      /^loadCases\[0\]\.factors\.c9: /,
    ],
    [
      "reversed AC",
      (d) => {
        firstOf(d.circuits)["supply"] = { kind: "ac1", currentA: 1, frequencyHz: 50 };
        d["loadCases"] = [{ id: "n", name: "N", factors: { c1: -1 } }];
      },
      /^loadCases\[0\]\.factors\.c1: .*DC only/,
    ],
    [
      "a pair on three phases",
      (d) => (firstOf(d.circuits)["supply"] = { kind: "ac3", currentA: 1, frequencyHz: 50 }),
      /^circuits\[0\]\.arrangement\.kind: pair does not fit/,
    ],
    [
      "conductors that overlap",
      (d) => (firstOf(d.circuits)["arrangement"] = { kind: "pair", spacingM: 0.011 }),
      /^circuits\[0\]\.arrangement\.spacingM: .*0.012/,
    ],
    [
      "heading without the Earth's field",
      (d) => (firstOf(d.sensors)["limits"] = [{ kind: "heading", limitDeg: 1 }]),
      /^sensors\[0\]\.limits\[0\]: .*earthField/,
    ],
    [
      "neither path nor route",
      (d) => delete firstOf(d.circuits)["path"],
      /^circuits\[0\]\.path: give a path/,
    ],
    [
      "stray current of a single",
      (d) => Object.assign(firstOf(d.circuits), { arrangement: { kind: "single" }, strayCurrentA: 2 }),
      /^circuits\[0\]\.strayCurrentA: /,
    ],
    [
      "a date that is none",
      (d) =>
        (d["earthField"] = {
          mode: "model",
          latitudeDeg: 0,
          longitudeDeg: 0,
          altitudeM: 0,
          date: "2026-02-30",
        }),
      /^earthField\.date: /,
    ],
    [
      "fractions that miss a part",
      (d) =>
        (firstOf(d.circuits)["arrangement"] = {
          kind: "custom",
          conductors: [
            { offsetM: [0, 0], of: "go", fraction: 0.5 },
            { offsetM: [1, 0], of: "return", fraction: 1 },
          ],
        }),
      /^circuits\[0\]\.arrangement\.conductors: the fractions of go add up to 0.5/,
    ],
  ])("refuses %s", (_what, edit, expected) => {
    expect(faultsAfter(edit).join("\n")).toMatch(expected);
  });

  it("refuses an unbalanced trefoil with the sum in the message unless it is declared as stray", () => {
    const phases = [
      { currentA: 100, angleDeg: 0 },
      { currentA: 100, angleDeg: -120 },
      { currentA: 90, angleDeg: 120 },
    ];
    const unbalanced = (stray: object) =>
      faultsAfter((d) =>
        Object.assign(firstOf(d.circuits), {
          arrangement: { kind: "trefoil", spacingM: 0.03 },
          supply: { kind: "ac3", frequencyHz: 50, phases },
          ...stray,
        }),
      );
    expect(unbalanced({}).join()).toMatch(/^circuits\[0\]\.supply: .*add up to 10 A at -60°/);
    expect(unbalanced({ strayCurrentA: 10, strayAngleDeg: -60 })).toEqual([]);
    const balanced = phases.map((phase) => ({ ...phase, currentA: 63.7 }));
    const supply = { kind: "ac3", frequencyHz: 50, phases: balanced };
    expect(unbalanced({ supply, strayCurrentA: 0.1 }).join()).toMatch(
      /add up to 0 A at 0° \(50 Hz\), but strayCurrentA declares 0\.1 A/,
    );
  });

  it("refuses what is no document without throwing", () => {
    for (const json of [null, 3, "x", [], {}]) expect(parsePlanDocument(json).ok).toBe(false);
  });
});

describe("planDocumentSchema", () => {
  it("gives a JSON Schema of what may be written", () => {
    const schema = z.toJSONSchema(planDocumentSchema, { io: "input" });
    expect(schema.required).toEqual(["format", "version", "name", "frame", "circuits", "sensors"]);
    expect(schema.additionalProperties).toBe(false);
  });
});
