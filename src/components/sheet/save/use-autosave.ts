import { useEffect, useMemo, useState } from "react";
import { Autosave, type SaveState } from "~/client/autosave";
import { keepDraft, type Draft } from "~/client/draft-store";
import { Latest } from "~/client/latest";
import { putPlan, type SavedPlan } from "~/client/plan-calls";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { History } from "~/sheet/history";
import type { SheetStore } from "../store";

export type PlanDraft = Draft<PlanDocument, History>;

interface Saving {
  state: SaveState<PlanDocument>;
  autosave: Autosave<PlanDocument>;
  /** False once the browser has refused to keep drafts. */
  keepsDrafts: boolean;
}

interface Options {
  store: SheetStore;
  planId: string;
  userId: string;
  /** What the server holds, and the base of what is on the sheet. */
  saved: SavedPlan;
}

const later = (callBack: () => void, delayMs: number): (() => void) => {
  const timer = setTimeout(callBack, delayMs);
  return () => clearTimeout(timer);
};

/** Saves each edit to the server and, before that, on this device with its history. */
export function useAutosave({ store, planId, userId, saved }: Options): Saving {
  const [state, setState] = useState<SaveState<PlanDocument>>({ kind: "saved", at: new Date(saved.savedAt) });
  const [keepsDrafts, setKeepsDrafts] = useState(true);
  const { autosave, keep } = useMemo(() => {
    const drafts = new Latest<PlanDraft>(async (draft) => {
      try {
        await keepDraft(draft);
      } catch {
        // Private windows and full disks keep nothing; the person is told, and the server still gets every edit.
        setKeepsDrafts(false);
      }
    });
    const keepNow = () => {
      const { document, history } = store.get().session;
      const { baseVersion, base } = saving;
      drafts.ask({ userId, planId, baseVersion, base, document, history, keptAt: new Date().toISOString() });
    };
    const saving = new Autosave<PlanDocument>(
      {
        put: (baseVersion, document) => putPlan(planId, baseVersion, document),
        onState: setState,
        // The draft then says that nothing of it is unsaved, and keeps the history.
        onSaved: keepNow,
        later,
      },
      { version: saved.version, document: saved.document, at: new Date(saved.savedAt) },
    );
    return { autosave: saving, keep: keepNow };
  }, [store, planId, userId, saved]);

  useEffect(() => {
    let document: PlanDocument = saved.document;
    const look = () => {
      const { session } = store.get();
      if (session.document === document) return;
      document = session.document;
      keep();
      autosave.edited(document);
    };
    look();
    const unsubscribe = store.subscribe(look);
    const retry = () => autosave.retry();
    const warn = (event: BeforeUnloadEvent) => {
      if (autosave.unsaved) event.preventDefault();
    };
    addEventListener("online", retry);
    addEventListener("beforeunload", warn);
    return () => {
      unsubscribe();
      autosave.stop();
      removeEventListener("online", retry);
      removeEventListener("beforeunload", warn);
    };
  }, [autosave, keep, store, saved]);

  return { state, autosave, keepsDrafts };
}
