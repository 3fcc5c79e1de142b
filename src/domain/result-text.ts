import type { ScreeningResult } from "./screening-result";

/** A result as it is stored, answered and printed: the same bytes for the same document everywhere. */
export const resultText = (result: ScreeningResult): string => `${JSON.stringify(result, null, 2)}\n`;
