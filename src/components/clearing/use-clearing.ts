import { useCallback, useEffect, useState } from "react";
import type { z } from "zod";
import { callApi } from "~/client/api";
import { clearingAnswer } from "~/domain/answers/screenings";

export type ClearingAnswer = z.output<typeof clearingAnswer>;

export type Asked =
  { state: "working" } | { state: "answered"; answer: ClearingAnswer } | { state: "failed"; message: string };

/** Each answer keeps a core of the server busy for a while: a page asks for one after the other. */
let before: Promise<unknown> = Promise.resolve();

function inTurn<T>(ask: () => Promise<T>): Promise<T> {
  const turn = before.then(ask, ask);
  before = turn.catch(() => undefined);
  return turn;
}

/** Asks what would clear, once on mounting and again by `again`. */
export function useClearing(url: string): { asked: Asked; again: () => void } {
  const [asked, setAsked] = useState<Asked>({ state: "working" });
  const [attempt, setAttempt] = useState(0);
  useEffect(() => {
    const controller = new AbortController();
    const { signal } = controller;
    inTurn(() => callApi(url, clearingAnswer, { signal })).then(
      (answer) => !signal.aborted && setAsked({ state: "answered", answer }),
      (failed: unknown) => {
        if (signal.aborted) return;
        setAsked({ state: "failed", message: failed instanceof Error ? failed.message : String(failed) });
      },
    );
    return () => controller.abort();
  }, [url, attempt]);
  const again = useCallback(() => {
    setAsked({ state: "working" });
    setAttempt((count) => count + 1);
  }, []);
  return { asked, again };
}
