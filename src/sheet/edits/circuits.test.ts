import { describe, expect, it } from "vitest";
import type { Circuit } from "~/domain/plan-document/circuit";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument } from "~/domain/plan-document/plan-document";
import {
  arrangementKinds,
  arrangementOf,
  circuitProblem,
  fittingKinds,
  rearranged,
  withPhaseOrder,
  withSets,
} from "./arrangements";
import { blankCircuit, supplyOf, usualSupplyKind, withCurrent, withSupply, withSupplyKind } from "./circuits";
import { nextOrder } from "./harmonics";
import { balanced, phasesOf, withPhases, withSumAsStray } from "./phases";

const path: Circuit["path"] = [
  [0, 0, 0],
  [5, 0, 0],
];
const blank: Circuit = { ...blankCircuit("c", "K1"), path };
const feed = (currentA: number): Circuit => withSupply(blank, withCurrent(supplyOf("ac3", null), currentA));
const isSound = (circuit: Circuit): boolean =>
  parsePlanDocument({ ...emptyPlanDocument("Hall"), circuits: [JSON.parse(JSON.stringify(circuit))] }).ok;

describe("a circuit's supply", () => {
  it("chosen while the current is not known enters no current; the arrangement follows", () => {
    const chosen = withSupplyKind(blank, "ac3");
    expect(chosen.supply).toBeNull();
    expect(chosen.arrangement.kind).toBe("trefoil");
    expect(usualSupplyKind(chosen)).toBe("ac3");
    expect(withSupplyKind(feed(40), "dc")).toMatchObject({ supply: { kind: "dc", currentA: 40 } });
  });

  it("keeps harmonics and sequence when its current changes", () => {
    const { supply } = feed(40);
    if (supply?.kind !== "ac3") throw new Error("three phases were asked for");
    const rich = { ...supply, sequence: "acb" as const, harmonics: [{ order: 5, percent: 20, angleDeg: 0 }] };
    expect(withCurrent(rich, 60)).toEqual({ ...rich, currentA: 60 });
  });

  it("goes into every arrangement that is offered for it, and into none that it does not fit", () => {
    for (const kind of ["dc", "ac1", "ac3"] as const) {
      const circuit = withSupply(blank, withCurrent(supplyOf(kind, null), 10));
      expect(isSound(circuit)).toBe(true);
      const fitting = fittingKinds(circuit);
      for (const other of fitting) expect(isSound(rearranged(circuit, other)), other).toBe(true);
      const others = arrangementKinds.filter((other) => !fitting.includes(other));
      for (const other of others) expect(isSound(rearranged(circuit, other)), other).toBe(false);
    }
  });

  it("sets thick conductors apart", () => {
    const thick = { ...rearranged(blank, "single"), conductorRadiusM: 0.05 };
    expect(rearranged(thick, "pair").arrangement).toMatchObject({ spacingM: 0.1 });
  });
});

describe("unbalanced phases", () => {
  const unbalanced = (circuit: Circuit): Circuit => {
    const { supply } = circuit;
    if (supply?.kind !== "ac3") throw new Error("three phases were asked for");
    const [a, b, c] = phasesOf(supply);
    return { ...circuit, supply: withPhases(supply, [{ ...a, currentA: 10 }, b, c]) };
  };

  it("need a conductor that carries back what they leave over, or their sum declared", () => {
    expect(circuitProblem(unbalanced(feed(40)))).toContain("none of them carries it back");
    expect(isSound(unbalanced(rearranged(feed(40), "quad")))).toBe(true);
    const declared = withSumAsStray(unbalanced(feed(40)));
    expect(declared.strayCurrentA).toBeCloseTo(30);
    expect(isSound(declared)).toBe(true);
  });

  it("begin as they were balanced and go back to it", () => {
    const { supply } = feed(40);
    if (supply?.kind !== "ac3") throw new Error("three phases were asked for");
    expect(balanced(withPhases(supply, phasesOf(supply)))).toEqual(supply);
  });
});

describe("parallel sets", () => {
  it("carry phase orders, kept when their number changes; all alike are none stated", () => {
    const two = withPhaseOrder(withSets(arrangementOf("flat", null), 2), 1, "cba");
    expect(two).toMatchObject({ parallel: { sets: 2, phaseOrders: ["abc", "cba"] } });
    expect(withSets(two, 3)).toMatchObject({ parallel: { phaseOrders: ["abc", "cba", "abc"] } });
    expect(withPhaseOrder(two, 1, "abc")).toMatchObject({ parallel: { phaseOrders: null } });
    expect(withSets(two, 1)).toMatchObject({ parallel: null });
    expect(isSound({ ...feed(100), arrangement: two })).toBe(true);
    expect(isSound(rearranged({ ...feed(100), arrangement: two }, "quad"))).toBe(true);
    expect(isSound(rearranged({ ...blank, arrangement: two }, "pair"))).toBe(true);
  });
});

describe("harmonics", () => {
  it("begin with odd orders, without those of three where nothing carries them back", () => {
    expect(nextOrder([{ order: 3 }], false)).toBe(5);
    expect(nextOrder([{ order: 5 }, { order: 7 }], true)).toBe(11);
  });
});
