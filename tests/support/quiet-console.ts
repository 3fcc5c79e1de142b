import { afterEach, beforeEach } from "vitest";

const noise: string[] = [];
const loud = ["error", "warn"] as const;
const original = { error: console.error, warn: console.warn };

/** A warning that nobody reads hides the one that matters: noise fails the test that makes it. */
beforeEach(() => {
  noise.length = 0;
  for (const level of loud) {
    console[level] = (...words: unknown[]) => noise.push(`console.${level}: ${words.map(String).join(" ")}`);
  }
});

afterEach(() => {
  for (const level of loud) console[level] = original[level];
  if (noise.length > 0) throw new Error(`The test was noisy:\n${noise.join("\n")}`);
});
