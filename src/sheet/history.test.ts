import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { applyDifference, differenceOf, invert, sameJson } from "./difference";
import { emptyHistory, record, redo, undo, type History } from "./history";

const plans = fc.record({
  name: fc.string(),
  routes: fc.array(fc.record({ id: fc.string(), path: fc.array(fc.integer()) }), { maxLength: 6 }),
  earthField: fc.option(
    fc.record({ mode: fc.constantFrom("stated", "model"), date: fc.string() }, { requiredKeys: ["mode"] }),
  ),
  factors: fc.dictionary(fc.constantFrom("c1", "c2", "c3"), fc.integer()),
});

describe("a difference", () => {
  it("turns one document into the other and back", () => {
    fc.assert(
      fc.property(plans, plans, (before, after) => {
        const difference = differenceOf(before, after);
        expect(applyDifference(before, difference)).toEqual(after);
        expect(applyDifference(after, invert(difference))).toEqual(before);
        expect(difference.length === 0).toBe(sameJson(before, after));
      }),
    );
  });

  it("holds only what differs", () => {
    const route = (x: number) => ({ id: "r1", path: [[x, 0, 0]] });
    expect(
      differenceOf({ a: 1, routes: [route(0), route(9)] }, { a: 1, routes: [route(0), route(8)] }),
    ).toEqual([{ at: ["routes", 1, "path", 0, 0], before: 9, after: 8 }]);
  });

  it("stores an added object once", () => {
    expect(differenceOf([1, 2, 3], [1, 2, 9, 3])).toEqual([{ at: [], index: 2, removed: [], added: [9] }]);
  });
});

describe("history", () => {
  it("undoes and redoes any number of edits", () => {
    fc.assert(
      fc.property(fc.array(plans, { minLength: 1, maxLength: 12 }), (documents) => {
        const distinct = documents.filter((document, i) => i === 0 || !sameJson(document, documents[i - 1]));
        let history: History = emptyHistory;
        distinct.forEach((document, i) => {
          if (i > 0) history = record(history, `edit ${i}`, distinct[i - 1], document);
        });
        let document = distinct[distinct.length - 1];
        for (let i = distinct.length - 1; i > 0; i--) {
          const back = undo(history, document);
          expect(back?.label).toBe(`edit ${i}`);
          expect(back?.document).toEqual(distinct[i - 1]);
          ({ document, history } = back as NonNullable<typeof back>);
        }
        expect(undo(history, document)).toBeNull();
        for (let i = 1; i < distinct.length; i++) {
          const on = redo(history, document);
          expect(on?.document).toEqual(distinct[i]);
          ({ document, history } = on as NonNullable<typeof on>);
        }
        expect(redo(history, document)).toBeNull();
      }),
    );
  });

  it("survives JSON, as the draft store keeps it", () => {
    const history = record(emptyHistory, "turned", { axis: null, a: 1 }, { axis: [0, 0, 1] });
    const kept = JSON.parse(JSON.stringify(history)) as History;
    expect(undo(kept, { axis: [0, 0, 1] })?.document).toEqual({ axis: null, a: 1 });
  });

  it("forgets what was undone as soon as something else is done", () => {
    const done = record(emptyHistory, "one", 1, 2);
    const undone = undo(done, 2);
    expect(record((undone as NonNullable<typeof undone>).history, "two", 1, 3).future).toEqual([]);
  });

  it("keeps no checkpoint that changes nothing", () => {
    expect(record(emptyHistory, "nothing", { a: [1] }, { a: [1] })).toBe(emptyHistory);
  });
});
