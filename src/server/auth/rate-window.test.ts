import { describe, expect, it } from "vitest";
import { waitBeforeNextMs, windowStart } from "./rate-window";

const tenAMinute = { limit: 10, windowMs: 60_000 };
const at = (s: number) => new Date(1_800_000_000_000 + s * 1000);

/** Makes an attempt at each second given; tells which were allowed and what the last one was told. */
function play(seconds: readonly number[], rate = tenAMinute) {
  const counted = new Map<number, number>();
  let lastWaitMs = 0;
  const allowed = seconds.filter((second) => {
    const now = at(second);
    const start = windowStart(now, rate).getTime();
    const current = counted.get(start) ?? 0;
    lastWaitMs = waitBeforeNextMs({ current, previous: counted.get(start - rate.windowMs) ?? 0 }, rate, now);
    if (lastWaitMs === 0) counted.set(start, current + 1);
    return lastWaitMs === 0;
  });
  return { allowed, lastWaitMs };
}

const times = (count: number, second: number): number[] => new Array<number>(count).fill(second);

describe("the sliding window", () => {
  it("starts windows on round minutes of the epoch", () => {
    expect(windowStart(at(0), tenAMinute)).toEqual(at(0));
    expect(windowStart(at(59.999), tenAMinute)).toEqual(at(0));
  });

  it("allows ten and refuses the eleventh", () => {
    expect(play(times(11, 5)).allowed).toHaveLength(10);
  });

  it("does not let the border between two windows double the limit", () => {
    expect(play([...times(10, 59), ...times(10, 61)]).allowed).toHaveLength(10);
  });

  it("forgets what is two windows old", () => {
    expect(play([...times(10, 5), ...times(10, 125)]).allowed).toHaveLength(20);
  });

  it.each([
    ["at the start of a window", times(11, 0)],
    ["in the middle of a window", times(11, 30)],
    ["at its end", times(15, 59)],
    ["with the last window still counting", [...times(10, 50), ...times(3, 61)]],
    ["with room in this window", [...times(10, 59), 66, 72, 72, 72]],
    ["with a limit of one", [0, 1]],
  ])("names a wait after which the next attempt is allowed, and not sooner, %s", (_, seconds) => {
    const rate = seconds.length === 2 ? { limit: 1, windowMs: 60_000 } : tenAMinute;
    const { lastWaitMs } = play(seconds, rate);
    expect(lastWaitMs).toBeGreaterThan(0);
    const last = seconds.at(-1) ?? 0;
    const retry = last + lastWaitMs / 1000;
    expect(play([...seconds, retry + 0.001], rate).lastWaitMs).toBe(0);
    expect(play([...seconds, retry - 1], rate).lastWaitMs).toBeGreaterThan(0);
  });
});
