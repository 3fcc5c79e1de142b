import { parseArgs } from "node:util";

/** `--name value` pairs of the command line; a missing or unknown name ends the process with a message. */
export function readOptions<Name extends string>(names: readonly Name[]): Record<Name, string> {
  const { values } = parseArgs({
    options: Object.fromEntries(names.map((name) => [name, { type: "string" as const }])),
  });
  const missing = names.filter((name) => typeof values[name] !== "string");
  if (missing.length > 0) {
    throw new Error(`Missing on the command line: ${missing.map((name) => `--${name}`).join(", ")}.`);
  }
  return values as Record<Name, string>;
}

export function portOf(value: string): number {
  const port = Number(value);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) throw new Error(`"${value}" is no port number.`);
  return port;
}
