import type { Disposition } from "./decision";
import { counted } from "./verdict-words";

/** A revision is under review until an auditor releases or returns it; the next release supersedes it. */
export const revisionStates = ["under-review", "returned", "released", "superseded"] as const;
export type RevisionState = (typeof revisionStates)[number];

export const revisionStateWords: Record<RevisionState, string> = {
  "under-review": "under review",
  returned: "returned",
  released: "released",
  superseded: "superseded",
};

/** What people are told of by e-mail. */
export type RevisionMailAbout =
  "submitted" | "returned" | "released" | "comment" | "concession-ending" | "concession-ended";

/** A release and a concession need a sign-in that is not older than this. */
export const freshSignInMs = 5 * 60_000;

const alphabet = "ABCDEFGHIJKLMNOPQRSTUVWXYZ";

/** The letters of the n-th revision, from 1: A … Z, AA, AB … */
export function revisionLetters(ordinal: number): string {
  let letters = "";
  for (let rest = ordinal; rest > 0; rest = Math.floor((rest - 1) / alphabet.length))
    letters = alphabet.charAt((rest - 1) % alphabet.length) + letters;
  return letters;
}

interface Signed {
  ordinal: number;
  planName: string;
  siteName: string;
  dispositions: readonly Disposition[];
}

/** What an auditor puts their name under. It states the counts, so that a later change of a decision makes another sentence. */
export function releaseSentence({ ordinal, planName, siteName, dispositions }: Signed): string {
  const count = (wanted: Disposition) => dispositions.filter((one) => one === wanted).length;
  return (
    `I have reviewed revision ${revisionLetters(ordinal)} of ${planName}, ${siteName}, and release it: ` +
    `${counted(count("released"), "position", "positions")} released, ` +
    `${String(count("concession"))} released under concession, ${String(count("held"))} held, ` +
    `${String(count("not-released"))} not released.`
  );
}

const asCompared = (name: string): string => name.normalize("NFC").replace(/\s+/gu, " ").trim();

/** Whether somebody typed their own name: spaces and the way accents are encoded do not matter, letters do. */
export const isOwnName = (typed: string, name: string): boolean => asCompared(typed) === asCompared(name);
