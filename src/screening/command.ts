import { readFileSync, statSync } from "node:fs";
import type { DocumentFault } from "~/domain/plan-document/faults";
import { MAX_DOCUMENT_BYTES, readPlanDocument } from "~/domain/plan-document/read";
import { resultText } from "~/domain/result-text";
import { RefusedDocumentError } from "./refusal";
import { screen } from "./screen";

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
    const read = readPlanDocument(textOf(file));
    if (!read.ok)
      return refuse("notJson" in read ? [documentFault(`not JSON: ${read.notJson}`)] : read.faults);
    const result = screen(read.document);
    process.stdout.write(resultText(result));
    return result.verdict === "within" ? EXIT.within : EXIT.flagged;
  } catch (error) {
    if (error instanceof RefusedDocumentError) return refuse(error.faults);
    console.error(error instanceof Error ? error.message : String(error));
    return EXIT.failed;
  }
}

const documentFault = (message: string): DocumentFault => ({ path: "document", message });

function textOf(file: string): string {
  const { size } = statSync(file);
  if (size > MAX_DOCUMENT_BYTES) {
    const message = `${size} bytes; a plan document has at most ${MAX_DOCUMENT_BYTES}. Split the plan by area`;
    throw new RefusedDocumentError([documentFault(message)]);
  }
  return readFileSync(file, "utf8");
}

function refuse(faults: readonly DocumentFault[]): number {
  for (const { path, message } of faults) console.error(`${path}: ${message}`);
  return EXIT.refused;
}

process.exitCode = main(process.argv.slice(2));
