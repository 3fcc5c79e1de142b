import * as z from "zod";

const vector = z.tuple([z.number(), z.number(), z.number()]);

/** Worst last. */
export const VERDICTS = ["within", "undecided", "over"] as const;
export const verdictSchema = z.enum(VERDICTS);

const alternatingField = z.strictObject({
  source: z.string(),
  frequencyHz: z.number(),
  re: vector,
  im: vector,
});

/** Of the phasors added over sources as if all were in step: root of the sum of squares, semi-major axis (rms) and peak to peak, T. */
const ellipse = z.strictObject({ rmsT: z.number(), majorAxisT: z.number(), peakToPeakT: z.number() });

export const findingSchema = z.strictObject({
  limitId: z.string(),
  kind: z.enum(["static", "alternating", "swing", "heading", "gradient", "range"]),
  limit: z.number(),
  value: z.number(),
  expandedUncertainty: z.number(),
  uncertaintyMethod: z.enum(["first-order", "monte-carlo"]),
  unit: z.enum(["T", "deg", "T/m"]),
  budgetUsed: z.number(),
  verdict: verdictSchema,
  /** Null without load cases and for swing. */
  loadCaseId: z.string().nullable(),
  /** Total at the sensor in the governing load case, plan axes, T, rms; for swing the difference of its two cases. */
  field: z.strictObject({ static: vector, alternating: z.array(alternatingField) }),
  /** Null for limits that judge no alternating field, and where nothing alternates. */
  ellipse: ellipse.nullable(),
  /** Shares of the value by circuit, equipment or "background"; they sum to 1 and may be negative. */
  contributions: z.array(z.strictObject({ id: z.string(), part: z.number() })),
});

const earthField = z.strictObject({
  northT: z.number(),
  eastT: z.number(),
  downT: z.number(),
  horizontalT: z.number(),
  declinationDeg: z.number(),
  inclinationDeg: z.number(),
  /** Name of the model, or "stated". */
  model: z.string(),
});

const openEnd = z.strictObject({ at: vector, currentA: z.number(), circuitIds: z.array(z.string()) });

export const screeningResultSchema = z.strictObject({
  format: z.literal("stillneedle-result"),
  version: z.literal(1),
  inputHash: z.string().regex(/^sha256:[0-9a-f]{64}$/),
  engineVersion: z.string(),
  verdict: verdictSchema,
  earthField: earthField.nullable(),
  sensors: z.array(
    z.strictObject({ id: z.string(), verdict: verdictSchema, findings: z.array(findingSchema) }),
  ),
  checks: z.strictObject({
    /** Largest error of the circulation self-check relative to the largest single current; null where nothing flows. */
    circulationError: z.number().nullable(),
    openEnds: z.array(openEnd),
    warnings: z.array(z.string()),
  }),
  leftOut: z.array(z.string()),
});

export type ScreeningResult = z.output<typeof screeningResultSchema>;
export type SensorResult = ScreeningResult["sensors"][number];
export type Finding = z.output<typeof findingSchema>;
export type Contribution = Finding["contributions"][number];
export type OpenEnd = z.output<typeof openEnd>;
export type EarthElements = z.output<typeof earthField>;
export type Verdict = z.output<typeof verdictSchema>;

/** The worse of two verdicts. */
export function worseVerdict(one: Verdict, other: Verdict): Verdict {
  return VERDICTS.indexOf(one) >= VERDICTS.indexOf(other) ? one : other;
}

export function worstVerdict(verdicts: readonly Verdict[]): Verdict {
  return verdicts.reduce(worseVerdict, "within");
}
