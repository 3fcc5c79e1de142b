import { readFileSync } from "node:fs";
import { parsePlanDocument, type DocumentFault } from "~/domain/plan-document/parse";
import { resultText } from "~/domain/result-text";
import { RefusedDocumentError } from "./refusal";
import { screen } from "./screen";

/** Largest plan document read, bytes. */
const MAX_BYTES = 20 * 1024 * 1024;

const EXIT = { within: 0, failed: 1, refused: 2, flagged: 3 } as const;

/**
 * `screen plan.json`: prints the result as JSON on standard output and nothing else there; exit status 0 when all are within, 3
 * when any is undecided or over, 2 when the document is refused (each fault a line `path: message` on standard error),
 * 1 for anything else.
 */
function main(args: readonly string[]): number {
  const [file, ...surplus] = args;
  if (!file || surplus.length > 0) {
    console.error("usage: screen plan.json");
    return EXIT.failed;
  }
  try {
    const parsed = parsePlanDocument(readJson(file));
    if (!parsed.ok) return refuse(parsed.faults);
    const result = screen(parsed.document);
    process.stdout.write(resultText(result));
    return result.verdict === "within" ? EXIT.within : EXIT.flagged;
  } catch (error) {
    if (error instanceof RefusedDocumentError) return refuse(error.faults);
    console.error(error instanceof Error ? error.message : String(error));
    return EXIT.failed;
  }
}

function readJson(file: string): unknown {
  const bytes = readFileSync(file);
  if (bytes.length > MAX_BYTES) {
    throw new RefusedDocumentError([
      { path: "document", message: `${bytes.length} bytes; a plan document has at most ${MAX_BYTES}` },
    ]);
  }
  try {
    return JSON.parse(bytes.toString("utf8"));
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    throw new RefusedDocumentError([{ path: "document", message: `not JSON: ${reason}` }]);
  }
}

function refuse(faults: readonly DocumentFault[]): number {
  for (const { path, message } of faults) console.error(`${path}: ${message}`);
  return EXIT.refused;
}

process.exitCode = main(process.argv.slice(2));
