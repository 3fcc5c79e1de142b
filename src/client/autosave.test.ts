import { describe, expect, it } from "vitest";
import { ApiRefusal, NoConnection } from "./api";
import { Autosave, restMs, type PutOutcome, type SaveState } from "./autosave";

/** A server that answers when told to, and a clock that moves when told to. */
function bench() {
  const puts: {
    baseVersion: number;
    document: string;
    answer: (outcome: PutOutcome<string>) => void;
    fail: (why: Error) => void;
  }[] = [];
  const states: SaveState<string>["kind"][] = [];
  const saved: [string, number][] = [];
  let timers: { atMs: number; callBack: () => void }[] = [];
  let nowMs = 0;
  const autosave = new Autosave<string>(
    {
      put: (baseVersion, document) =>
        new Promise((answer, fail) => {
          puts.push({ baseVersion, document, answer, fail });
        }),
      onState: (state) => states.push(state.kind),
      onSaved: (document, version) => saved.push([document, version]),
      later: (callBack, delayMs) => {
        const timer = { atMs: nowMs + delayMs, callBack };
        timers.push(timer);
        return () => {
          timers = timers.filter((other) => other !== timer);
        };
      },
    },
    { version: 1, document: "a", at: new Date(0) },
  );
  const pass = (ms: number) => {
    nowMs += ms;
    const due = timers.filter((timer) => timer.atMs <= nowMs);
    timers = timers.filter((timer) => timer.atMs > nowMs);
    for (const timer of due) timer.callBack();
  };
  const settle = () => new Promise<void>((done) => setImmediate(done));
  return { autosave, puts, states, saved, pass, settle };
}

const ok = (version: number): PutOutcome<string> => ({
  kind: "saved",
  version,
  savedAt: "2026-12-01T14:02:00Z",
});

describe("autosave", () => {
  it("waits for a rest, then saves the newest once", async () => {
    const { autosave, puts, states, pass, settle } = bench();
    autosave.edited("b");
    pass(restMs - 1);
    autosave.edited("c");
    pass(restMs - 1);
    expect(puts).toHaveLength(0);
    pass(1);
    expect(puts).toMatchObject([{ baseVersion: 1, document: "c" }]);
    puts[0]?.answer(ok(2));
    await settle();
    expect(states.at(-1)).toBe("saved");
    expect(autosave.unsaved).toBe(false);
  });

  it("never overlaps: edits during a save go into the next one, on the new version", async () => {
    const { autosave, puts, pass, settle } = bench();
    autosave.edited("b");
    pass(restMs);
    autosave.edited("c");
    pass(10 * restMs);
    expect(puts).toHaveLength(1);
    puts[0]?.answer(ok(2));
    await settle();
    pass(restMs);
    expect(puts[1]).toMatchObject({ baseVersion: 2, document: "c" });
  });

  it("keeps trying without a connection and at once when told", async () => {
    const { autosave, puts, states, pass, settle } = bench();
    autosave.edited("b");
    pass(restMs);
    puts[0]?.fail(new NoConnection());
    await settle();
    expect(states.at(-1)).toBe("no-connection");
    pass(2_000);
    expect(puts).toHaveLength(2);
    puts[1]?.fail(new NoConnection());
    await settle();
    autosave.retry();
    pass(0);
    expect(puts).toHaveLength(3);
    puts[2]?.answer(ok(2));
    await settle();
    expect(states.at(-1)).toBe("saved");
  });

  it("stops at a conflict until the person has chosen, then saves on top of the other's version", async () => {
    const { autosave, puts, states, pass, settle } = bench();
    autosave.edited("b");
    pass(restMs);
    const theirs = { version: 7, document: "x", savedByName: "Ada", savedAt: "2026-12-01T14:03:00Z" };
    puts[0]?.answer({ kind: "conflict", theirs });
    await settle();
    autosave.edited("bb");
    pass(10 * restMs);
    expect(puts).toHaveLength(1);
    expect(states.at(-1)).toBe("conflict");
    autosave.rebase(theirs, "bbx");
    pass(0);
    expect(puts[1]).toMatchObject({ baseVersion: 7, document: "bbx" });
  });

  it("says what was refused and saves again after the next edit", async () => {
    const { autosave, puts, states, pass, settle } = bench();
    autosave.edited("bad");
    pass(restMs);
    puts[0]?.fail(new ApiRefusal("document.refused", 422, "The plan is refused."));
    await settle();
    expect(states.at(-1)).toBe("refused");
    pass(60_000);
    expect(puts).toHaveLength(1);
    autosave.edited("good");
    pass(restMs);
    expect(puts[1]?.document).toBe("good");
  });

  it("flushes what is edited and tells the version, or null when it can't", async () => {
    const { autosave, puts, saved, settle } = bench();
    expect(await autosave.flush()).toBe(1);
    autosave.edited("b");
    const flushed = autosave.flush();
    await settle();
    puts[0]?.answer(ok(2));
    expect(await flushed).toBe(2);
    expect(saved).toEqual([["b", 2]]);
    autosave.edited("c");
    const failed = autosave.flush();
    await settle();
    puts[1]?.fail(new NoConnection());
    expect(await failed).toBeNull();
    expect(autosave.unsaved).toBe(true);
  });
});
