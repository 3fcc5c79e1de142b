import { describe, expect, it } from "vitest";
import { Latest } from "./latest";

describe("the latest", () => {
  it("runs one task at a time, the newest of those that waited, and the last one always", async () => {
    const ran: number[] = [];
    const ends: (() => void)[] = [];
    let atOnce = 0;
    const latest = new Latest<number>(async (task) => {
      atOnce++;
      expect(atOnce).toBe(1);
      ran.push(task);
      await new Promise<void>((end) => ends.push(end));
      atOnce--;
    });
    for (const task of [1, 2, 3]) latest.ask(task);
    ends[0]?.();
    await new Promise((done) => setImmediate(done));
    expect(ran).toEqual([1, 3]);
    latest.ask(4);
    ends[1]?.();
    await new Promise((done) => setImmediate(done));
    expect(ran).toEqual([1, 3, 4]);
  });
});
