import { describe, expect, it } from "vitest";
import { emptyPlanDocument } from "~/domain/plan-document/plan-document";
import { emptyHistory, record } from "~/sheet/history";
import { resume } from "./resume";
import type { PlanDraft } from "./use-autosave";

const plan = (name: string) => emptyPlanDocument(name);
const saved = { version: 3, document: plan("three"), savedAt: "2026-12-01T14:00:00Z", savedByName: "Ada" };
const history = record(emptyHistory, "Name", plan("two"), plan("three"));

const draft = (part: Partial<PlanDraft>): PlanDraft => ({
  userId: "u",
  planId: "p",
  baseVersion: 3,
  base: plan("three"),
  document: plan("three"),
  history,
  keptAt: "2026-12-01T14:02:00Z",
  ...part,
});

describe("going on after a reload", () => {
  it("takes the server's plan, with the history where it still fits", () => {
    expect(resume(saved, null)).toMatchObject({ document: saved.document, history: emptyHistory });
    expect(resume(saved, draft({}))).toMatchObject({ history, restoredFrom: null });
  });

  it("puts unsaved edits back, on the version that they were made on", () => {
    const start = resume(saved, draft({ document: plan("mine") }));
    expect(start).toMatchObject({ document: { name: "mine" }, restoredFrom: "2026-12-01T14:02:00Z" });
    expect(start.saved).toMatchObject({ version: 3, document: { name: "three" } });
  });

  it("goes on from the old version where somebody else has saved since, so that the save finds the conflict", () => {
    const start = resume(saved, draft({ baseVersion: 2, base: plan("two"), document: plan("mine") }));
    expect(start.saved).toMatchObject({ version: 2, document: { name: "two" } });
  });

  it("sees that a save has arrived although its answer was lost", () => {
    const start = resume(saved, draft({ baseVersion: 2, base: plan("two"), document: plan("three") }));
    expect(start).toMatchObject({ restoredFrom: null, history, saved: { version: 3 } });
  });

  it("takes the other person's plan where nothing of mine was unsaved", () => {
    const start = resume(saved, draft({ baseVersion: 2, base: plan("two"), document: plan("two") }));
    expect(start).toMatchObject({ document: { name: "three" }, history: emptyHistory, restoredFrom: null });
  });
});
