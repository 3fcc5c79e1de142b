import { randomStream } from "../../uncertainty/random";
import type { Steps } from "../../steps";

/** Up to so many combinations are all tried. */
export const MAX_COMBINATIONS = 20_000;
const RANDOM_STARTS = 6;
/** Beyond so many places pairs would be too many, and one place is changed at a time. */
const PAIRED_PLACES = 16;
const ROOT_3 = Math.sqrt(3);
/** How many costs are asked for between two steps. */
const SLICE = 200;

export interface BestChoice {
  choice: number[];
  cost: number;
  /** Whether every combination was tried. */
  exhaustive: boolean;
}

/**
 * The choice of one of `options` in each of `places` with the least cost. All combinations up to 20 000; beyond that a descent by one
 * place and by pairs of places from the present choice, the regular ones and a few drawn ones. Deterministic; ties keep the first.
 */
export function* bestChoice(
  places: number,
  options: number,
  present: readonly number[],
  costOf: (choice: readonly number[]) => number,
): Steps<BestChoice> {
  return options ** places <= MAX_COMBINATIONS
    ? yield* exhaustiveChoice(places, options, present, costOf)
    : yield* descendedChoice(places, options, present, costOf);
}

export function* exhaustiveChoice(
  places: number,
  options: number,
  present: readonly number[],
  costOf: (choice: readonly number[]) => number,
): Steps<BestChoice> {
  const total = options ** places;
  let best: BestChoice = { choice: [...present], cost: costOf(present), exhaustive: true };
  for (let combination = 0; combination < total; combination++) {
    if (combination % SLICE === 0) yield { done: combination, total };
    const choice = digits(combination, places, options);
    const cost = costOf(choice);
    if (cost < best.cost) best = { choice, cost, exhaustive: true };
  }
  return best;
}

export function* descendedChoice(
  places: number,
  options: number,
  present: readonly number[],
  costOf: (choice: readonly number[]) => number,
): Steps<BestChoice> {
  const starts = startsOf(places, options, present);
  let best: BestChoice = { choice: [...present], cost: costOf(present), exhaustive: false };
  for (const [index, start] of starts.entries()) {
    yield { done: index, total: starts.length };
    const found = yield* descend(start, options, costOf);
    if (found.cost < best.cost) best = found;
  }
  return best;
}

function* descend(
  start: number[],
  options: number,
  costOf: (choice: readonly number[]) => number,
): Steps<BestChoice> {
  let best: BestChoice = { choice: start, cost: costOf(start), exhaustive: false };
  for (let improved = true; improved;) {
    improved = false;
    for (const changed of neighbours(best.choice, options)) {
      yield { done: 0, total: 1 };
      for (const choice of changed) {
        const cost = costOf(choice);
        if (cost >= best.cost) continue;
        best = { choice, cost, exhaustive: false };
        improved = true;
      }
      if (improved) break;
    }
  }
  return best;
}

/** Choices that differ in one place, then in two; a group for each place or pair. */
function* neighbours(choice: readonly number[], options: number): Generator<number[][]> {
  const all = Array.from({ length: options }, (_, option) => option);
  for (let one = 0; one < choice.length; one++) yield all.map((option) => choice.with(one, option));
  if (choice.length > PAIRED_PLACES) return;
  for (let one = 0; one < choice.length; one++) {
    for (let other = one + 1; other < choice.length; other++) {
      yield all.flatMap((first) => all.map((second) => choice.with(one, first).with(other, second)));
    }
  }
}

function startsOf(places: number, options: number, present: readonly number[]): number[][] {
  const alternating = (step: number) =>
    Array.from({ length: places }, (_, i) => (i % 2 === 0 ? 0 : step % options));
  const random = randomStream("5ca1ab1e0ddba11c0ffee123", places);
  const drawn = Array.from({ length: RANDOM_STARTS }, () =>
    Array.from({ length: places }, () =>
      Math.min(options - 1, Math.floor(((random.rectangular() / ROOT_3 + 1) / 2) * options)),
    ),
  );
  return [[...present], alternating(0), alternating(options - 1), ...drawn];
}

function digits(combination: number, places: number, options: number): number[] {
  const out: number[] = [];
  for (let rest = combination, i = 0; i < places; i++) {
    out.push(rest % options);
    rest = Math.floor(rest / options);
  }
  return out;
}
