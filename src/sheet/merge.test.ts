import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { emptyPlanDocument, type PlanDocument } from "~/domain/plan-document/plan-document";
import { blankCircuit } from "./edits/circuits";
import { removeCircuits } from "./edits/remove";
import { changeWords, compare, merge, type Side } from "./merge";

const route = (id: string, x: number): PlanDocument["routes"][number] => ({
  id,
  name: `Route ${id}`,
  path: [
    [0, 0, 0],
    [x, 0, 0],
  ],
});

const circuit = (id: string, routeId: string | null, name = id): PlanDocument["circuits"][number] => ({
  ...blankCircuit(id, name),
  route: routeId === null ? null : { id: routeId, placeM: [0, 0] },
});

const base: PlanDocument = {
  ...emptyPlanDocument("Hall"),
  routes: [route("r1", 1), route("r2", 2)],
  circuits: [circuit("c1", "r1"), circuit("c2", "r2")],
  loadCases: [{ id: "l1", name: "Peak", factors: { c1: 0.5 } }],
};

const withRouteX = (document: PlanDocument, id: string, x: number): PlanDocument => ({
  ...document,
  routes: document.routes.map((item) => (item.id === id ? route(id, x) : item)),
});

describe("a three-way merge", () => {
  it("takes each person's changes where only one of them changed something", () => {
    const mine = withRouteX(base, "r1", 9);
    const theirs = { ...withRouteX(base, "r2", 7), name: "Hall 2" };
    expect(compare(base, mine, theirs)).toMatchObject({
      conflicts: [],
      onlyMine: [{ key: "routes/r1" }],
      onlyTheirs: [{ key: "name" }, { key: "routes/r2" }],
    });
    expect(merge(base, mine, theirs, {})).toEqual({ ...withRouteX(mine, "r2", 7), name: "Hall 2" });
  });

  it("lets one choose per object what both changed, and keeps mine unless told", () => {
    const mine = withRouteX(withRouteX(base, "r1", 9), "r2", 9);
    const theirs = withRouteX(withRouteX(base, "r1", 7), "r2", 7);
    expect(compare(base, mine, theirs).conflicts.map(({ key }) => key)).toEqual(["routes/r1", "routes/r2"]);
    expect(merge(base, mine, theirs, { "routes/r2": "theirs" }).routes).toEqual([
      route("r1", 9),
      route("r2", 7),
    ]);
  });

  it("keeps what both added", () => {
    const mine = { ...base, circuits: [...base.circuits, circuit("mine", null)] };
    const theirs = { ...base, circuits: [...base.circuits, circuit("theirs", null)] };
    expect(merge(base, mine, theirs, {}).circuits.map(({ id }) => id)).toEqual([
      "c1",
      "c2",
      "theirs",
      "mine",
    ]);
  });

  it("brings back a route that a circuit still names, and drops factors of circuits that are gone", () => {
    const mine = { ...base, circuits: [circuit("c1", "r1", "renamed"), circuit("c2", "r2")] };
    const theirs = {
      ...base,
      routes: [route("r2", 2)],
      circuits: [circuit("c1", null), circuit("c2", "r2")],
    };
    const merged = merge(base, mine, theirs, { "circuits/c1": "mine" });
    expect(merged.routes.map(({ id }) => id).sort()).toEqual(["r1", "r2"]);
    const deleted = merge(
      base,
      removeCircuits(base, ["c1"]),
      { ...base, loadCases: [{ ...base.loadCases[0], id: "l1", name: "Peak", factors: { c1: 0.2 } }] },
      { "loadCases/l1": "theirs" },
    );
    expect(deleted.loadCases[0]?.factors).toEqual({});
  });

  it("gives mine when the other changed nothing, theirs when I changed nothing, the same when both agree", () => {
    const sides = fc.record({ x1: fc.integer(), x2: fc.integer(), name: fc.string(), without: fc.boolean() });
    const of = ({
      x1,
      x2,
      name,
      without,
    }: {
      x1: number;
      x2: number;
      name: string;
      without: boolean;
    }): PlanDocument => {
      const moved = { ...withRouteX(withRouteX(base, "r1", x1), "r2", x2), name };
      return without ? removeCircuits(moved, ["c2"]) : moved;
    };
    fc.assert(
      fc.property(sides, sides, fc.constantFrom<Side>("mine", "theirs"), (a, b, side) => {
        const [mine, theirs] = [of(a), of(b)];
        expect(merge(base, mine, base, {})).toEqual(mine);
        expect(merge(base, base, theirs, {})).toEqual(theirs);
        expect(merge(base, mine, mine, {})).toEqual(mine);
        const choices = Object.fromEntries(
          compare(base, mine, theirs).conflicts.map(({ key }) => [key, side]),
        );
        const there = merge(base, mine, theirs, choices);
        for (const { key } of compare(base, mine, theirs).conflicts) {
          const list = compare(base, there, side === "mine" ? mine : theirs).conflicts.map(
            (piece) => piece.key,
          );
          expect(list).not.toContain(key);
        }
      }),
    );
  });

  it("says in words what happened to an object", () => {
    expect(changeWords(undefined, {})).toBe("added");
    expect(changeWords({}, undefined)).toBe("deleted");
    expect(changeWords(route("r1", 1), { ...route("r1", 2), name: "Riser" })).toBe(
      "changed: name “Riser”, vertices",
    );
    const pumped = { supply: { kind: "dc", currentA: 9 }, position: [1, 2, 3], loadGroup: null };
    expect(changeWords({ supply: null, position: [0, 0, 0], loadGroup: "a" }, pumped)).toBe(
      "changed: supply dc, 9 A, position (1, 2, 3), loadGroup not known",
    );
  });
});
