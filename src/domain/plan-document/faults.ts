import type * as z from "zod";

/** One thing wrong with a document: where (`circuits[2].supply.currentA`) and what to do. */
export interface DocumentFault {
  path: string;
  message: string;
}

/** Faults listed of one document; a flood says no more than its beginning. */
export const MAX_FAULTS = 200;

/** Faults counted at most: nobody mends more, and judging on costs time. */
const MAX_COUNTED = 10_000;

/** Longest piece of a document's own words in a path. */
const MAX_WORD = 100;

/** A path as people and jq read it: `circuits[2].supply.currentA`; the document itself is `document`. */
export function pathText(path: readonly PropertyKey[]): string {
  const text = path.reduce<string>((before, key) => {
    if (typeof key === "number") return `${before}[${key}]`;
    const word = shortened(String(key));
    if (/^[A-Za-z_$][\w$-]*$/.test(word)) return before === "" ? word : `${before}.${word}`;
    return `${before}[${JSON.stringify(word)}]`;
  }, "");
  return text === "" ? "document" : text;
}

const shortened = (word: string): string => (word.length > MAX_WORD ? `${word.slice(0, MAX_WORD)}…` : word);

/** Keeps the first faults and counts the rest. */
export class FaultList {
  private readonly listed: DocumentFault[] = [];
  private count = 0;

  /** `at` is where the judged part stands in the document. */
  add(issues: readonly z.core.$ZodIssue[], at: readonly PropertyKey[] = []): void {
    for (const issue of issues)
      for (const fault of faultsOf(issue, at)) {
        this.count += 1;
        if (this.listed.length < MAX_FAULTS) this.listed.push(fault);
      }
  }

  /** Whether so many are counted that no more need be looked for. */
  get isFlood(): boolean {
    return this.count >= MAX_COUNTED;
  }

  get isEmpty(): boolean {
    return this.count === 0;
  }

  /** What is listed, and a last line that says how many more there are. */
  get faults(): DocumentFault[] {
    const more = this.count - this.listed.length;
    if (more === 0) return this.listed;
    const atLeast = this.isFlood ? "at least " : "";
    const message = `and ${atLeast}${more} more fault${more === 1 ? "" : "s"}; the first ${MAX_FAULTS} are listed`;
    return [...this.listed, { path: "document", message }];
  }
}

function faultsOf(issue: z.core.$ZodIssue, at: readonly PropertyKey[]): DocumentFault[] {
  const path = [...at, ...issue.path];
  if (issue.code === "unrecognized_keys") {
    return issue.keys.map((key) => ({
      path: pathText([...path, key]),
      message: "unknown key: nothing reads it, so it is refused; remove it or check its spelling",
    }));
  }
  if (issue.code === "invalid_union" && issue.errors.length > 0) {
    const nested = issue.errors.map((errors) => errors.map((error) => error.message).join(", "));
    return [{ path: pathText(path), message: `fits no form: ${nested.join("; or ")}` }];
  }
  if (issue.code === "invalid_key") {
    return [{ path: pathText(path), message: issue.issues.map((inner) => inner.message).join(", ") }];
  }
  return [{ path: pathText(path), message: issue.message }];
}
