import * as z from "zod";

const controlsButLineEndAndTab = /[^\P{Cc}\n\t]/gu;

/** Plain text of a person over several lines: line ends made uniform, no control characters. */
export const plainText = (what: string, maxLength = 4000) =>
  z
    .string()
    .max(maxLength, `${what} has at most ${String(maxLength)} characters.`)
    .transform((text) => text.replace(/\r\n?/g, "\n").replace(controlsButLineEndAndTab, "").trim());

export const requiredText = (what: string, missing: string, maxLength = 4000) =>
  plainText(what, maxLength).refine((text) => text !== "", missing);
