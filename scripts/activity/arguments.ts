import { parseArgs } from "node:util";

export const usage = `npm run activity -- verify [--organisation SHORT-NAME] [--head HASH]

Computes the hash chain of every organisation's activity log anew, or of one, and names each line that was changed, removed
or exchanged. With --head it says at which line a head stands that was printed or noted earlier (16 digits or more).
Exit status: 0 the logs are whole, 1 something failed, 2 a log is not whole or the head stands nowhere in it.`;

export interface Wish {
  organisation?: string;
  head?: string;
}

/** @throws Error with what is wrong and the usage */
export function readArguments(words: readonly string[]): Wish {
  const refuse = (fault: string): never => {
    throw new Error(`${fault}\n\n${usage}`);
  };
  const [command, ...rest] = words;
  if (command !== "verify") return refuse(`"${command ?? ""}" is no command.`);
  const option = { type: "string" } as const;
  let values: Wish;
  try {
    ({ values } = parseArgs({ args: rest, options: { organisation: option, head: option } }));
  } catch (error) {
    return refuse(error instanceof Error ? error.message : String(error));
  }
  if (values.head === undefined) return values;
  if (values.organisation === undefined) return refuse("--head needs --organisation.");
  const head = values.head.replace(/\s/g, "").toLowerCase();
  return /^[0-9a-f]{16,64}$/.test(head) ? { ...values, head } : refuse("--head is no hash.");
}
