import * as z from "zod";
import { instant } from "./common";
import { planDocumentJson } from "./plan-document-json";

export const workingCopyAnswer = z.object({
  version: z.int(),
  document: planDocumentJson,
  savedAt: instant,
  /** Null when whoever saved it is no longer known. */
  savedByName: z.string().nullable(),
});

export const savedAnswer = z.object({ version: z.int(), savedAt: instant });

export const renamedAnswer = z.object({ version: z.int() });

export const drawingAnswer = z.object({
  id: z.uuid(),
  widthPx: z.int(),
  heightPx: z.int(),
  fileName: z.string(),
  url: z.string(),
  thumbnailUrl: z.string(),
});
