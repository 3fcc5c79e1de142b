import * as z from "zod";
import { decisionKinds } from "../decision";
import { revisionStates } from "../revision";
import { verdictSchema } from "../screening-result";
import { instant, madeAnswer } from "./common";

export const submittedAnswer = madeAnswer.extend({ letters: z.string() });

const sha256 = z.string().regex(/^[0-9a-f]{64}$/);

const heading = z.object({
  id: z.uuid(),
  /** A, B, C … */
  letters: z.string(),
  state: z.enum(revisionStates),
  note: z.string(),
  verdict: verdictSchema,
  engineVersion: z.string(),
  submittedAt: instant,
  submittedByName: z.string().nullable(),
  closedAt: instant.nullable(),
  closedByName: z.string().nullable(),
});

export const revisionListAnswer = z.object({ revisions: z.array(heading) });

const position = z.object({
  sensorId: z.string(),
  sensorName: z.string(),
  verdict: verdictSchema,
  budgetUsed: z.number(),
  disposition: z.enum(["released", ...decisionKinds, "waiting"]),
  reason: z.string().nullable(),
  /** Last day of a concession on the site's calendar. */
  expiresOn: z.iso.date().nullable(),
  moveTo: z.string().nullable(),
  decidedAt: instant.nullable(),
});

export const revisionAnswer = heading.extend({
  returnReasons: z.string().nullable(),
  /** What was signed on release, and the name under it. */
  signedSentence: z.string().nullable(),
  signedName: z.string().nullable(),
  hashes: z.object({
    documentSha256: sha256,
    drawingSha256: sha256.nullable(),
    resultSha256: sha256,
    /** Over the three and the engine's version. */
    sealSha256: sha256,
    inputHash: z.string(),
  }),
  positions: z.array(position),
});

export const decidedAnswer = z.object({ ordinal: z.int() });
export const commentedAnswer = z.object({ id: z.uuid() });
export const releasedAnswer = z.object({ releasedAt: instant });
export const returnedAnswer = z.object({ returnedAt: instant });

export const recomputedAnswer = z.object({
  engineVersion: z.string(),
  engineVersionThen: z.string(),
  /** Whether the result's text is the same to the byte. */
  sameBytes: z.boolean(),
  /** Of every value and uncertainty: |now − then| / the larger of the two; null where a finding has no counterpart. */
  largestDifference: z.number().nullable(),
  changedVerdicts: z.array(
    z.object({
      sensorId: z.string(),
      sensorName: z.string(),
      before: verdictSchema.nullable(),
      after: verdictSchema.nullable(),
    }),
  ),
});
